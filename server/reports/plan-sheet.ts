/**
 * The sheet of a signed plan: whose eye, which side, which lens, large enough to be read at arm's length, and
 * everything it was signed on. Data in, bytes out.
 */
import { formulaFacts } from '@/formulas';
import { FORMULA_NAMES, METHOD_NAMES, type Plan, type PlanSnapshot } from '@/shared/contract';
import {
  axisText,
  chanceText,
  dateText,
  MISSING,
  momentText,
  plain,
  powerText,
  signed,
} from './sheet-numbers';
import { MARGIN, SheetPage, type Paper } from './sheet-page';

export interface PlanSheetRequest {
  snapshot: PlanSnapshot;
  digest: string;
  plan: Pick<Plan, 'status' | 'outOfDateReasons' | 'side'>;
  paper: Paper;
}

export function planSheet({ snapshot, digest, plan, paper }: PlanSheetRequest): Promise<Buffer> {
  const { patient, signedAt, sequence, signedBy } = snapshot;
  const name = `${patient.familyName}, ${patient.givenName}`;
  const page = new SheetPage(paper, {
    title: `Lens plan ${sequence}, ${snapshot.eye.side} eye, ${name}`,
    at: new Date(signedAt),
  });
  head(page, snapshot);
  voidBanner(page, plan);
  sideAndPerson(page, snapshot);
  choice(page, snapshot);
  predictions(page, snapshot);
  measurement(page, snapshot);
  flags(page, snapshot);
  return page.finish((number, pages) => [
    `${name}, born ${dateText(patient.birthDate)}, record ${patient.recordNumber} · ${snapshot.eye.side.toUpperCase()} EYE · plan ${sequence} · page ${number} of ${pages}`,
    `Signed by ${signedBy.displayName}, ${momentText(signedAt)} · digest ${digest}`,
    'Decision support for trained clinicians. It does not replace judgement, the device’s own printout, local codes or licensed practice. Check inputs against their source.',
  ]);
}

function head(page: SheetPage, { practiceName, sequence, patient }: PlanSnapshot): void {
  page.text(practiceName, { size: 10, isInline: true });
  page.text(`Lens plan ${sequence}`, { font: 'wordsBold', size: 10, align: 'right' });
  if (patient.isDemo)
    page.text('DEMONSTRATION: person and lenses are invented. Not for use on patients.', {
      font: 'wordsBold',
      size: 10,
    });
  page.gap(4);
  page.rule(1.5);
}

function voidBanner(page: SheetPage, { status, outOfDateReasons }: PlanSheetRequest['plan']): void {
  const reasons = status === 'replaced' ? ['A newer plan of this eye was signed'] : outOfDateReasons;
  if (reasons.length === 0) return;
  page.text(`VOID: ${reasons.join('. ')}. Do not use this sheet.`, { font: 'wordsBold', size: 16 });
  page.rule(1.5);
}

/** The right eye stands on the left half, as one faces the patient. */
function sideAndPerson(page: SheetPage, { eye, patient }: PlanSnapshot): void {
  const half = page.width / 2;
  const isRight = eye.side === 'right';
  const top = page.y;
  page.text(`${eye.side.toUpperCase()} EYE`, {
    font: 'wordsBold',
    size: 38,
    x: isRight ? MARGIN : MARGIN + half,
    width: half,
  });
  const bottom = page.y;
  page.y = top;
  const x = isRight ? MARGIN + half : MARGIN;
  page.text(`${patient.familyName}, ${patient.givenName}`, { font: 'wordsBold', size: 15, x, width: half });
  page.text(`born ${dateText(patient.birthDate)}, ${patient.sex}`, { size: 12, x, width: half });
  page.text(`record ${patient.recordNumber}`, { font: 'numbers', size: 12, x, width: half });
  page.y = Math.max(page.y, bottom) + 4;
  page.rule(1.5);
}

function choice(
  page: SheetPage,
  { chosenLensName, choice: chosen, chosenCandidate, input, calculation, lenses }: PlanSnapshot,
): void {
  const lens = lenses.find(({ id }) => id === chosen.lensId);
  const model = calculation.models.find(({ lensId }) => lensId === chosen.lensId);
  const leading = model?.leadingFormula ? FORMULA_NAMES[model.leadingFormula] : MISSING;
  page.text(`${chosenLensName}${lens?.isDemo ? ' (invented)' : ''}`, { font: 'wordsBold', size: 20 });
  page.text(`${powerText(chosen.powerD)} D`, { font: 'numbersBold', size: 46 });
  page.text(`Target ${signed(input.targetD, 2)} D`, { font: 'wordsBold', size: 13 });
  const { landing } = chosenCandidate;
  const { cornealCylinderD, steepAxisDeg } = calculation.eye;
  page.text(`Cornea ${plain(cornealCylinderD, 2)} D, steep meridian ${axisText(steepAxisDeg)}`, {
    font: 'wordsBold',
    size: 13,
  });
  page.text(
    `Predicted ${signed(landing.meanD, 2)} D by ${leading}; lands within ±${input.toleranceD.toFixed(2)} D of the target in ${chanceText(landing.chance)} of such eyes (standard deviation ${landing.sdD.toFixed(2)} D).`,
    { size: 11 },
  );
  if (input.note) page.text(`Note: ${input.note}`, { size: 11 });
}

function predictions(page: SheetPage, { chosenCandidate, calculation, choice: chosen }: PlanSnapshot): void {
  const model = calculation.models.find(({ lensId }) => lensId === chosen.lensId);
  page.heading(
    `Every formula for ${powerText(chosen.powerD)} D (formula version ${calculation.formulaVersion})`,
  );
  page.table(
    [
      { title: 'Formula', share: 2 },
      { title: 'Predicted (D)', share: 1.6, isNumber: true },
      { title: 'Lens position (mm)', share: 1.8, isNumber: true },
      { title: 'Constants', share: 3, isNumber: true },
      { title: 'Whose, for which length, dated', share: 4.4 },
    ],
    chosenCandidate.predictions.map(({ formula, refractionD, elpMm }) => {
      const constant = model?.constants.find((candidate) => candidate.formula === formula);
      const leads = formula === model?.leadingFormula ? ' (leads)' : '';
      return [
        `${FORMULA_NAMES[formula]}${leads}`,
        signed(refractionD, 2),
        plain(elpMm, 2),
        Object.values(constant?.values ?? {})
          .map(String)
          .join(' / ') || MISSING,
        constant ? `${constant.source}, ${constant.origin}, ${dateText(constant.dated)}` : MISSING,
      ];
    }),
  );
  for (const { formula, reason } of model?.silenced ?? [])
    page.text(`${FORMULA_NAMES[formula]} is silent: ${reason}.`, { size: 9 });
  const cautioned = chosenCandidate.predictions.filter(
    ({ formula }) => formulaFacts[formula].caution !== null,
  );
  if (cautioned.length > 0) {
    page.text(
      `From memory of the papers, not yet checked against print: ${cautioned.map(({ formula }) => FORMULA_NAMES[formula]).join(', ')}.`,
      { size: 9 },
    );
  }
}

function measurement(page: SheetPage, { measurement: measured, calculation: { eye } }: PlanSnapshot): void {
  const { values, provenance } = measured;
  page.heading('Measurement');
  page.table(
    [
      { title: 'Axial length (mm)', share: 1, isNumber: true },
      { title: 'Flat / steep radius (mm)', share: 1.4, isNumber: true },
      { title: 'Mean K (D, 1.3375)', share: 1.1, isNumber: true },
      { title: 'Cylinder (D) @ steep', share: 1.2, isNumber: true },
      { title: 'ACD epithelium (mm)', share: 1.1, isNumber: true },
      { title: 'Lens (mm)', share: 0.8, isNumber: true },
    ],
    [
      [
        plain(eye.axialLengthMm, 2),
        `${plain(eye.flatRadiusMm, 2)} / ${plain(eye.steepRadiusMm, 2)}`,
        plain(eye.meanKeratometryD, 2),
        `${plain(eye.cornealCylinderD, 2)} @ ${axisText(eye.steepAxisDeg)}`,
        plain(eye.anteriorChamberDepthMm, 2),
        plain(values.lensThicknessMm, 2),
      ],
    ],
  );
  const from =
    provenance.kind === 'file'
      ? `file ${provenance.fileName}, row ${provenance.row}`
      : `entered by ${provenance.enteredBy}`;
  page.text(
    `${METHOD_NAMES[values.method]}, ${dateText(values.measuredAt)}, ${values.device || 'device not given'}; ${from}.`,
    { size: 9 },
  );
}

function flags(page: SheetPage, { calculation }: PlanSnapshot): void {
  if (calculation.flags.length === 0) return;
  page.heading('Flags when it was signed');
  for (const { severity, message, settlement } of calculation.flags) {
    const settled = settlement
      ? ` Settled by ${settlement.by}, ${momentText(settlement.at)}: ${settlement.reason}`
      : '';
    page.text(`${severity.toUpperCase()}: ${message}.${settled}`, { size: 9 });
  }
}
