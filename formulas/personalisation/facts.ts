/** What is known about each rule of personalisation, for the method page. */
import type { MethodFacts } from '../method-facts';

export const personalisationFacts: readonly MethodFacts[] = [
  {
    id: 'personalisation/cohort',
    name: 'Cohort',
    equations: [
      { text: 'error = achieved - predicted spherical equivalent; + is a hyperopic surprise', mark: 'CP' },
      {
        text: 'dR/dd = (n/(L - d)² - v²/n)/(1 + v d/n)²/(1 + 0.001 V Rc)², v = n/(L - d) - P',
        mark: 'D',
      },
    ],
    sources: [
      { citation: 'Wang, Koch, Hill, Abulafia, J Cataract Refract Surg 2017;43:999', mark: 'V' },
      { citation: 'ultrasound and optical cases are never pooled', mark: 'CP' },
    ],
    validRange:
      'Eyes without corneal surgery, refraction stable, lens in the bag, the power implanted (clinical rules decide which).',
    checks: ['Predictions of the door', 'The derivative beside differences', 'Mixed origins are refused'],
    notKnown: ['The 2017 editorial was read in its first page only.'],
  },
  {
    id: 'personalisation/lens-position',
    name: 'Back-calculated lens position',
    equations: [
      { text: 'd = ((L + s) - √((s - L)² + 4 n (s - L)/P))/2, s = n/(Kc + Rc)', mark: 'D' },
      {
        text: 'A = (d - H + 3.336 + 68.747)/0.62467; SF = d - aACD; pACD and a0 by difference',
        mark: 'D',
      },
    ],
    sources: [
      { citation: 'the thin-lens core of all formulas solved for the lens plane', mark: 'D' },
      { citation: 'Holladay et al., J Cataract Refract Surg 1988;14:17-24', mark: 'V' },
    ],
    validRange: 'Lenses with power; a place between cornea and the middle of the eye.',
    checks: ['Round trip through all formulas'],
    notKnown: ['One eye says little: the mean of ideal constants is not the constant of zero mean error.'],
  },
  {
    id: 'personalisation/zero-mean-error',
    name: 'Constant of zero mean error',
    equations: [
      { text: 'the root c of Σ error(c) = 0', mark: 'V' },
      { text: 'SE(c) = SE(mean error)/|d mean error/dc|; interval by Student', mark: 'D' },
    ],
    sources: [{ citation: 'Hoffer et al., Am J Ophthalmol 2015;160:1086', mark: 'V' }],
    validRange: 'From two patients on; lenses of positive power on the whole.',
    checks: [
      'Mean error 0 to 1e-9 for any cohort',
      'Interval holds the true constant in 93 to 97 % of 500 simulated cohorts, each formula',
    ],
    notKnown: ['An excerpt of the protocol was read, not its whole.'],
  },
  {
    id: 'personalisation/haigis-triple',
    name: 'Haigis triple',
    equations: [
      { text: 'd = a0 + a1 ACD + a2 AL by least squares, weight (dR/dd)²; then a0 zeroed', mark: 'D' },
    ],
    sources: [
      {
        citation: 'Haigis, in: Shammas (ed), Intraocular Lens Power Calculations, Slack 2004, ch. 5',
        mark: 'M',
      },
      { citation: 'Langenbucher et al., PLOS ONE 2022 e0267352', mark: 'V' },
    ],
    validRange: 'From 250 eyes whose middle 90 % of axial lengths span 3 mm.',
    checks: ['Recovered from simulated eyes', 'Exact without noise'],
    notKnown: [
      'Whether the chapter weighs the eyes; the weights are ours.',
      'Published case minima (200 or more) are recalled with low confidence.',
      'Measurement errors of depth and length flatten the slopes; this is not corrected.',
    ],
  },
  {
    id: 'personalisation/shrinkage',
    name: 'Shrinkage',
    equations: [
      { text: 'w = τ²/(τ² + SE²); constant = published + w (own - published)', mark: 'D' },
      { text: 'τ = 0.29 D of refraction; SD = τ √(1 - w)', mark: 'D' },
    ],
    sources: [
      { citation: 'normal likelihood with a normal prior', mark: 'D' },
      { citation: 'Gale et al., Eye 2009', mark: 'V' },
    ],
    validRange: 'Published constant of the same kind of biometry.',
    checks: ['Between published and own', 'The derivation of 0.29 D', 'Closer to the truth in simulations'],
    notKnown: [
      "Which of Gale's audit cycles customised the constants is our reading.",
      'A published constant of the wrong kind, such as a default of ultrasound for optical lengths, is a poor centre: few cases then stay too close to it.',
    ],
  },
  {
    id: 'personalisation/expected-error',
    name: 'Expected error',
    equations: [{ text: 's² = ((n - 1) own² + 30 expected²)/(n - 1 + 30)', mark: 'D' }],
    sources: [
      { citation: 'scaled inverse chi-square prior', mark: 'D' },
      { citation: 'optical 0.45 D and ultrasound 0.66 D as in the default spread', mark: 'V' },
    ],
    validRange: 'From one case on.',
    checks: ['Ends and middle by hand'],
    notKnown: ['Immersion alone would be 0.54 D; the larger figure draws more to the published constant.'],
  },
  {
    id: 'personalisation/out-of-sample',
    name: 'Out-of-sample effect',
    equations: [{ text: 'each patient judged by the constant of the other folds', mark: 'M' }],
    sources: [{ citation: 'Stone, J R Stat Soc B 1974;36:111-147', mark: 'M' }],
    validRange: 'At least as many patients as folds; ten folds.',
    checks: ['Never better than in sample for zeroed constants', 'Gain found in simulated cohorts'],
    notKnown: ['The interval of the gain takes the constants of the folds as given.'],
  },
  {
    id: 'personalisation/gates',
    name: 'Gates',
    equations: [
      { text: '20 provisional, 50 suggest, 100 recommend, 250 three constants', mark: 'CP' },
      { text: 'SD 0.45 D: SE 0.10, 0.064, 0.045, 0.028 D', mark: 'D' },
    ],
    sources: [{ citation: 'proposed by this product, common practice', mark: 'CP' }],
    validRange: 'Eyes of one lens model, formula, axial-length method and biometer.',
    checks: ['Both sides of every gate'],
    notKnown: ['Published minima are recalled with low confidence.'],
  },
  {
    id: 'personalisation/cases-needed',
    name: 'Cases needed',
    equations: [{ text: 'n = (1.96 SD/half-width)²', mark: 'D' }],
    sources: [{ citation: 'n = (1.96 SD / half-width)^2', mark: 'D' }],
    validRange: 'A little too hopeful below 20 eyes.',
    checks: ['75 eyes for 0.10 D at SD 0.44 D'],
    notKnown: [],
  },
  {
    id: 'personalisation/axial-length-groups',
    name: 'Errors by axial length',
    equations: [{ text: 'below 22, 22 to 24.5, above 24.5 to 26, above 26 mm', mark: 'M' }],
    sources: [
      { citation: 'Hoffer et al., Am J Ophthalmol 2015;160:1086', mark: 'M' },
      { citation: 'Langenbucher 2023 (a constant changes the trend with axial length)', mark: 'V' },
    ],
    validRange: 'A summary from two patients on.',
    checks: ['Eyes at every edge'],
    notKnown: ['To which group the edges belong in the protocol.'],
  },
  {
    id: 'personalisation/review',
    name: 'Cases to review',
    equations: [{ text: '|error| > 2 D, or beyond 3 SD of the list', mark: 'CP' }],
    sources: [{ citation: 'common practice', mark: 'CP' }],
    validRange: 'Nothing is dropped by itself.',
    checks: ['Both sides of both limits'],
    notKnown: [],
  },
  {
    id: 'personalisation/spread-scale',
    name: 'Spread scale',
    equations: [{ text: 'k² = ((n - 1) own² + 30)/(n - 1 + 30), own = SD(error/predicted SD)', mark: 'D' }],
    sources: [
      { citation: 'standard deviation of error over predicted deviation', mark: 'D' },
      { citation: 'own results are preferred from 30 cases on', mark: 'CP' },
    ],
    validRange: 'From two outcomes on.',
    checks: ['Recovered from simulated landings', 'Chances of landing honest after scaling'],
    notKnown: ['One factor for all parts: it cannot tell which part is wrong.'],
  },
  {
    id: 'personalisation/propose',
    name: 'Proposal',
    equations: [{ text: 'the constant proposed is the shrunk one', mark: 'CP' }],
    sources: [{ citation: 'the gates and rules named in their own files', mark: 'CP' }],
    validRange: 'As its parts.',
    checks: ['Agrees with its parts'],
    notKnown: [],
  },
];
