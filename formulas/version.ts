/**
 * Goes into every signed plan. Major: a number changes for an ordinary eye; minor: a number changes at an edge, or
 * a formula is added; patch: no number changes.
 */
export const FORMULA_VERSION = '1.0.0';
