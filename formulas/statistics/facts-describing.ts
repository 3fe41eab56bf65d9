import type { MethodFacts } from '../method-facts';

const R = 'R 4.2.2 (frozen numbers with the script that made them)';

/** Describing one list of errors, and how sure the figures are. */
export const describingFacts: readonly MethodFacts[] = [
  {
    id: 'statistics/mean-and-deviation',
    name: 'Mean and standard deviation',
    equations: [{ text: 'mean = Σx/n; SD = √(Σ(x - mean)²/(n - 1))', mark: 'N' }],
    sources: [
      { citation: 'Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999', mark: 'V' },
      {
        citation: 'Chan, Golub, LeVeque, Am Stat 1983;37:242-247 (corrected two-pass algorithm)',
        mark: 'M',
      },
    ],
    validRange: 'One value for a mean, two for a deviation.',
    checks: [
      R,
      'simple-statistics and mathjs',
      'Certified values of NIST StRD Michelso (read), NumAcc4 (recalled)',
    ],
    notKnown: ['The 2017 editorial was read in its first page only.'],
  },
  {
    id: 'statistics/quantile',
    name: 'Quantile and median',
    equations: [{ text: 'position (n - 1) p, linear between neighbours (type 7)', mark: 'M' }],
    sources: [{ citation: 'Hyndman, Fan, Am Stat 1996;50:361-365', mark: 'M' }],
    validRange: 'At least one value; share from 0 to 1.',
    checks: [R, 'simple-statistics (median)'],
    notKnown: ['Other programs may use another of nine definitions; medians agree, outer quantiles differ.'],
  },
  {
    id: 'statistics/absolute-error',
    name: 'Mean and median absolute error',
    equations: [{ text: 'mean and median of |achieved - predicted|', mark: 'V' }],
    sources: [
      { citation: 'Hoffer et al., Am J Ophthalmol 2015;160:1086', mark: 'V' },
      { citation: 'Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999', mark: 'V' },
    ],
    validRange: 'At least one value. They say little where the mean error is not zero.',
    checks: [R],
    notKnown: ['Only the first part of the 2015 protocol was read.'],
  },
  {
    id: 'statistics/error-summary',
    name: 'Error summary',
    equations: [
      { text: 'share = eyes with |error| ≤ band / n, for 0.25, 0.50, 0.75, 1.00, 2.00 D', mark: 'V' },
    ],
    sources: [
      { citation: 'Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999', mark: 'V' },
      { citation: 'Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg 2021;47:65-77', mark: 'M' },
    ],
    validRange: 'From two patients on. An error counts as within a band up to 1e-9 D beyond it.',
    checks: ['Errors at the edges of bands', 'Its parts, each checked by itself'],
    notKnown: ['The full list of figures that the 2021 paper asks for is recalled.'],
  },
  {
    id: 'statistics/wilson-interval',
    name: 'Wilson interval',
    equations: [
      { text: '(p + z²/2n ± z √(p(1 - p)/n + z²/4n²)) / (1 + z²/n)', mark: 'V' },
      { text: 'with both eyes of patients: n over the design effect', mark: 'M' },
    ],
    sources: [
      { citation: 'Wilson, J Am Stat Assoc 1927;22:209-212', mark: 'V' },
      { citation: 'Newcombe, Stat Med 1998;17:857-872', mark: 'V' },
      { citation: 'Korn, Graubard, Surv Methodol 1998;24:193-201', mark: 'M' },
    ],
    validRange: 'At least one eye.',
    checks: [R, 'A published interval of 6 in 32 (read)', '81 of 263: 0.2553 to 0.3662 (recalled)'],
    notKnown: [
      'Papers cited were not opened; the formula was read elsewhere.',
      'The design effect is estimated from the same eyes.',
    ],
  },
  {
    id: 'statistics/clustered-mean',
    name: 'Clustered mean',
    equations: [
      { text: 'SE² = G/(G - 1) Σ over patients (Σ of their x - mean)² / n²', mark: 'M' },
      { text: 'interval by Student with G - 1 degrees of freedom', mark: 'D' },
    ],
    sources: [{ citation: 'Liang, Zeger, Biometrika 1986;73:13-22', mark: 'M' }],
    validRange: 'From two patients on; with few patients the interval is wide, and still approximate.',
    checks: [
      R + ', package sandwich 3.0-2',
      'SD/√n with one eye per patient',
      'Coverage of 95 % in 2000 simulated cohorts with both eyes',
    ],
    notKnown: ['Below about 20 patients the estimate of relatedness is rough.'],
  },
  {
    id: 'statistics/normal-quantile',
    name: 'Normal quantile',
    equations: [{ text: 'the root of Φ(z) = p', mark: 'D' }],
    sources: [{ citation: 'the inverse of spread/normal by a bracketed root', mark: 'D' }],
    validRange: 'Strictly between 0 and 1.',
    checks: [R, 'simple-statistics to its two digits'],
    notKnown: ['Below 1e-10 the tail of the distribution function loses digits.'],
  },
  {
    id: 'statistics/student-t',
    name: "Student's t",
    equations: [{ text: 'P(|T| ≥ t) = I(ν/(ν + t²); ν/2, 1/2)', mark: 'N' }],
    sources: [
      { citation: 'Student, Biometrika 1908;6:1-25', mark: 'M' },
      { citation: 'NIST/SEMATECH e-Handbook of Statistical Methods', mark: 'V' },
    ],
    validRange: 'Any t; degrees of freedom above 0.',
    checks: [R, 'jstat to eight digits', 'A printed table to its three decimals (read)'],
    notKnown: [],
  },
  {
    id: 'statistics/f-and-chi-square',
    name: 'F and chi-square',
    equations: [
      { text: 'P(F ≥ f) = I(ν₂/(ν₂ + ν₁ f); ν₂/2, ν₁/2)', mark: 'M' },
      { text: 'P(χ² ≥ x) = Q(ν/2, x/2)', mark: 'M' },
    ],
    sources: [{ citation: 'NIST Digital Library of Mathematical Functions, 8.17 and 8.2', mark: 'M' }],
    validRange: 'Not negative; degrees of freedom above 0.',
    checks: [R, 'jstat to seven digits', 'The closed form of F with two degrees of freedom'],
    notKnown: [],
  },
  {
    id: 'statistics/gamma-function',
    name: 'Log-gamma',
    equations: [{ text: 'Lanczos series, g = 7, nine terms', mark: 'M' }],
    sources: [{ citation: 'Lanczos, SIAM J Numer Anal 1964;1:86-96', mark: 'M' }],
    validRange: 'Above 0.',
    checks: [R, 'jstat'],
    notKnown: ['The coefficients are those in circulation, recalled.'],
  },
  {
    id: 'statistics/incomplete-beta',
    name: 'Regularised incomplete beta function',
    equations: [{ text: 'continued fraction 8.17.22', mark: 'M' }],
    sources: [{ citation: 'NIST Digital Library of Mathematical Functions, 8.17.22', mark: 'M' }],
    validRange: 'x from 0 to 1, shapes above 0; tested to 10,000.',
    checks: ['jstat', 'By Student, F and the binomial of R'],
    notKnown: [],
  },
  {
    id: 'statistics/incomplete-gamma',
    name: 'Regularised incomplete gamma function',
    equations: [{ text: 'series 8.11.4, continued fraction 8.9.2', mark: 'M' }],
    sources: [{ citation: 'NIST Digital Library of Mathematical Functions, 8.11.4', mark: 'M' }],
    validRange: 'x not negative, shape above 0.',
    checks: ['The exponential for shape 1', 'By chi-square of R'],
    notKnown: [],
  },
];
