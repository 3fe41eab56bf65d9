/** Thresholds of the checks, in one place. Sources and marks stand beside the rules that use them. */
export const CHECK_LIMITS = {
  axialLengthMm: { low: 21.3, high: 26.6 },
  meanKeratometryD: { low: 41, high: 47 },
  cornealCylinderD: 2.5,
  betweenEyesAxialLengthMm: { note: 0.3, weigh: 0.7 },
  betweenEyesKeratometryD: 0.9,
  axialLengthSdMm: { optical: { note: 0.03, weigh: 0.05 }, ultrasound: { note: 0.1, weigh: 0.12 } },
  lensThicknessMm: { note: 5, weigh: 5.4 },
  lensThicknessOverFellowMm: 0.5,
  shallowChamberMm: 2.5,
  veryShallowChamberMm: 2.2,
  chamberAndLensMm: { low: 6.5, high: 8.5 },
  whiteToWhiteMm: { low: 10.75, high: 13 },
  cornealThicknessUm: { low: 450, high: 620 },
  axialLengthToRadius: { low: 2.7, high: 3.5 },
  ageDays: { note: 365, weigh: 730 },
  axisMattersFromD: 0.75,
} as const;
