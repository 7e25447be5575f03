/** The cautions, worded once, shown where the figure stands and on every export. */
export const CAUTIONS = {
  yield: 'Estimates for planning, not a promise of yield.',
  soil: 'Soil and lime figures: check with a certified crop adviser or the state extension service.',
  herbicide:
    'Herbicide programmes: the label is the law; follow it and state rules, and use a licensed applicator where the law asks for one.',
  treatedSeed: 'Treated seed: not for food, feed or oil; wear what the tag says.',
} as const;
