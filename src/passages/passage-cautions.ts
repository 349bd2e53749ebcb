/** What cautions of a passage say besides those of an advisory. */
export const PASSAGE_CAUTIONS = {
  'convoy-size-unknown': 'A towboat reports its own hull, not its convoy: that of the convoy may be lower.',
  'bank-sides-unknown':
    'Which bank is the nearer one is not known: the vessel is taken to be off the sailing line towards it.',
  'position-at-bank':
    'As reported, the hull reaches over a waterline: it is judged as close to it as it floats.',
  'judged-on-sailing-line':
    'The hull cannot float at the position reported: it is judged on the sailing line.',
  'laden-does-not-fit': 'Laden as its class, the vessel does not fit this water: it is judged empty.',
} as const
export type PassageCaution = keyof typeof PASSAGE_CAUTIONS
