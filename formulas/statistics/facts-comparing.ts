import type { MethodFacts } from '../method-facts';

const R = 'R 4.2.2 (frozen numbers with the script that made them)';
const ONE_EYE = 'Eyes count as independent: one eye per patient has to be chosen first.';

/** Comparing formulas in the same eyes, resampling, and what is drawn. */
export const comparingFacts: readonly MethodFacts[] = [
  {
    id: 'statistics/trimmed',
    name: 'Trimmed mean and Winsorised variance',
    equations: [
      { text: 'g = ⌊0.2 n⌋ values cut from each end, or drawn in to the last value kept', mark: 'V' },
    ],
    sources: [
      {
        citation: 'Wilcox, Introduction to Robust Estimation and Hypothesis Testing, Academic Press, ch. 3',
        mark: 'V',
      },
      { citation: 'Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg 2021;47:65-77', mark: 'M' },
    ],
    validRange: 'A trim below a half.',
    checks: [R],
    notKnown: ["The book was not opened, only its published program; the 2021 paper's 20 % is recalled."],
  },
  {
    id: 'statistics/yuen-paired',
    name: "Yuen's paired test",
    equations: [
      { text: 'h = n - 2g; SE² = (n - 1)(s²wx + s²wy - 2 swxy) / (h(h - 1))', mark: 'V' },
      { text: 't = difference of trimmed means / SE, h - 1 degrees of freedom', mark: 'V' },
    ],
    sources: [
      { citation: 'Yuen, Biometrika 1974;61:165-170', mark: 'V' },
      {
        citation: 'Wilcox, Introduction to Robust Estimation and Hypothesis Testing, Academic Press, ch. 5',
        mark: 'V',
      },
    ],
    validRange: 'At least two eyes left after trimming.',
    checks: [
      'The published equations written out in R',
      "R's and simple-statistics' paired t without a trim",
    ],
    notKnown: [ONE_EYE, 'The 1974 paper was not opened.'],
  },
  {
    id: 'statistics/compare-deviations',
    name: 'Paired comparison of standard deviations',
    equations: [
      { text: 'V = x - y, U = x + y; equal SDs where their correlation is 0', mark: 'V' },
      {
        text: 'slope of standardised U on V; SE by HC4: Σ v² e²/(1 - h)^min(4, h/h̄) / (n - 1)²',
        mark: 'V',
      },
      { text: 't = slope/SE, n - 2 degrees of freedom', mark: 'V' },
    ],
    sources: [
      {
        citation: 'Wilcox, Comparing the variances of two dependent variables, J Stat Distrib Appl 2015;2:7',
        mark: 'V',
      },
      { citation: 'Morgan, Biometrika 1939;31:13-19; Pitman, Biometrika 1939;31:9-12', mark: 'V' },
      { citation: 'Cribari-Neto, Comput Stat Data Anal 2004;45:215-233 (HC4)', mark: 'M' },
    ],
    validRange: 'At least four eyes; the formulas must differ in more than one.',
    checks: [
      R + ', package sandwich 3.0-2',
      'Level below 7 % in 1500 simulated cohorts with heavy tails, where the plain test passes 15 %',
    ],
    notKnown: [
      ONE_EYE,
      'Whether the 2021 recommendations for prediction errors use this form or a bootstrap could not be read.',
    ],
  },
  {
    id: 'statistics/holm',
    name: "Holm's step-down",
    equations: [{ text: 'p(i) adjusted = max over j ≤ i of min(1, (m - j + 1) p(j))', mark: 'M' }],
    sources: [{ citation: 'Holm, Scand J Stat 1979;6:65-70', mark: 'M' }],
    validRange: 'All comparisons that were made, also those not shown.',
    checks: [R, 'Between p and Bonferroni, in the order of p'],
    notKnown: [],
  },
  {
    id: 'statistics/compare-formulas',
    name: 'Pairwise comparison',
    equations: [{ text: 'k formulas are k(k - 1)/2 comparisons, adjusted together', mark: 'D' }],
    sources: [{ citation: 'Holm, Scand J Stat 1979;6:65-70', mark: 'M' }],
    validRange: 'Lists in one order of eyes.',
    checks: ['Three formulas by hand'],
    notKnown: [ONE_EYE],
  },
  {
    id: 'statistics/mcnemar',
    name: "McNemar's test",
    equations: [
      { text: 'exact: p = min(1, 2 P(X ≤ min(b, c))), X binomial (b + c, 1/2)', mark: 'M' },
      { text: 'corrected: χ² = (|b - c| - 1)²/(b + c), one degree of freedom', mark: 'N' },
    ],
    sources: [
      { citation: 'McNemar, Psychometrika 1947;12:153-157', mark: 'M' },
      { citation: 'Edwards, Psychometrika 1948;13:185-187', mark: 'M' },
      { citation: "Agresti's approval ratings (86 and 150) on a university's teaching page", mark: 'V' },
    ],
    validRange: 'Any counts; without an eye that differs p is 1.',
    checks: [R, 'simple-statistics (binomial)', '17.3559 published for 86 and 150, uncorrected (read)'],
    notKnown: [ONE_EYE],
  },
  {
    id: 'statistics/cochran-q',
    name: "Cochran's Q",
    equations: [
      { text: 'Q = (k - 1)(k Σ columns² - N²)/(k N - Σ rows²), k - 1 degrees of freedom', mark: 'V' },
    ],
    sources: [{ citation: 'Cochran, Biometrika 1950;37:256-266', mark: 'V' }],
    validRange: 'At least two formulas; approximate where few eyes differ.',
    checks: ["R's Friedman test of zeros and ones", "McNemar's uncorrected statistic for two formulas"],
    notKnown: [ONE_EYE, 'The formula was read in an encyclopaedia, not in the paper.'],
  },
  {
    id: 'statistics/bootstrap',
    name: 'Bootstrap intervals',
    equations: [
      { text: 'percentile: quantiles of the resampled statistic', mark: 'M' },
      { text: 'bootstrap-t: trimmed mean ± quantile of |t*| times its standard error', mark: 'M' },
    ],
    sources: [
      {
        citation: 'Efron, Tibshirani, An Introduction to the Bootstrap, Chapman and Hall 1993, ch. 12 and 13',
        mark: 'M',
      },
      {
        citation: 'Wilcox, Introduction to Robust Estimation and Hypothesis Testing, Academic Press, ch. 4',
        mark: 'M',
      },
    ],
    validRange: 'Two items for percentiles, five values for bootstrap-t.',
    checks: [
      'Enumeration of all samples of three',
      'The normal interval of a mean of 400',
      'Coverage in 250 simulated cohorts with heavy tails',
    ],
    notKnown: ['Percentile intervals are too narrow in small samples.'],
  },
  {
    id: 'statistics/double-angle-ellipse',
    name: 'Double-angle centroid and ellipse',
    equations: [
      { text: 'X = m cos 2a, Y = m sin 2a; centroid = mean of both', mark: 'V' },
      { text: 'centroid: (z - mean)ᵀ S⁻¹ (z - mean) ≤ 2(n - 1)/(n(n - 2)) F(2, n - 2)', mark: 'M' },
      { text: 'eyes: the same with n + 1 in place of 1', mark: 'D' },
    ],
    sources: [
      { citation: 'Hotelling, Ann Math Stat 1931;2:360-378', mark: 'M' },
      { citation: 'Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg 2022', mark: 'V' },
      { citation: 'Thibos et al., Optom Vis Sci 1997;74:367-375', mark: 'V' },
    ],
    validRange: 'Three eyes for an ellipse; vectors near normal.',
    checks: [R + ', by eigenvectors', 'Coverage of 95 % in 1500 simulated cohorts of eight eyes'],
    notKnown: [ONE_EYE, 'The convex polygon asked for where vectors are not normal is not computed.'],
  },
  {
    id: 'statistics/k-fold',
    name: 'Out-of-sample error by folds',
    equations: [{ text: 'each patient in one fold; each fold judged by a fit on the others', mark: 'M' }],
    sources: [{ citation: 'Stone, J R Stat Soc B 1974;36:111-147', mark: 'M' }],
    validRange: 'At least as many patients as folds.',
    checks: ['Hand-made folds', 'The relation n/(n - 1) of leaving one out of a mean'],
    notKnown: ['Another seed divides differently and moves the result a little.'],
  },
  {
    id: 'statistics/two-regressor-fit',
    name: 'Fit by two measurements',
    equations: [
      { text: 'minimise Σ w (y - c - b₁ x₁ - b₂ x₂)²', mark: 'D' },
      { text: 'slopes: cluster sandwich times G/(G - 1) (n - 1)/(n - 3)', mark: 'M' },
    ],
    sources: [
      { citation: 'normal equations about the weighted means', mark: 'D' },
      { citation: 'Liang, Zeger, Biometrika 1986;73:13-22', mark: 'M' },
    ],
    validRange: 'Five rows; measurements that do not move together.',
    checks: [R + ', package sandwich 3.0-2'],
    notKnown: [],
  },
];
