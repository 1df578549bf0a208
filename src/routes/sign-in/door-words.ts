import type { FieldProblems } from '../../lib/check-form.ts';

/** What is wrong with a field, in a sentence. */
export const doorWords: FieldProblems = {
  email: 'An address such as name@example.org is needed.',
  name: 'A name is needed, of 100 characters at most.',
  password: 'At least 10 characters, and no more than 128.',
  code: 'The code that the server printed when it started is needed.',
};
