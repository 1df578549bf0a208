/** Limits on the text of one equation: generous for people, small enough that no text can hang a reader. */
export const equationLimits = {
  characters: 2000,
  /** Levels of nesting; a flat sum or product of many terms counts as one level. */
  depth: 64,
  nodes: 1000,
  /** Characters of one number, as for a parameter. */
  numberCharacters: 400,
  parameters: 200,
} as const;
