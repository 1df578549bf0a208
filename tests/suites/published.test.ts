import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Decimal } from 'decimal.js';
import { describe, expect, it } from 'vitest';
import { readSuiteText } from '../../shared/suites/read-suite.ts';

const folder = fileURLToPath(new URL('../../suites/', import.meta.url));

function rootOf(suite: string, id: string): string {
  const found = cases(suite).find((plain) => plain.id === id);
  return found?.roots.find((root) => root.allowed)?.value ?? '';
}

const read = new Map<string, ReturnType<typeof readSuiteText>>();
function cases(suite: string) {
  const known = read.get(suite) ?? readSuiteText(readFileSync(`${folder}${suite}.yaml`, 'utf8'));
  read.set(suite, known);
  return known.cases;
}

/** Values printed elsewhere, to the digits given there. */
const published: [suite: string, id: string, value: string, source: string][] = [
  ['open-starts', 'wallis', '2.0945514815423265', 'Burkardt, test_zero collection, problem 17'],
  [
    'open-starts',
    'cube-28',
    '3.0365889718756625194208095785',
    'Boost.Math documentation, cube root comparison',
  ],
  ['open-starts', 'dottie', '0.7390851332151606416553', 'Dottie number, OEIS A003957, from memory'],
  [
    'open-starts',
    'omega',
    '0.567143290409783872999968662210355',
    'omega constant, OEIS A030178, from memory',
  ],
  ['open-starts', 'plastic', '1.324717957244746026', 'plastic number, from memory'],
  ['open-starts', 'tribonacci', '1.8392867552141611326', 'tribonacci constant, from memory'],
  ['open-starts', 'leonardo', '1.368808107', 'Leonardo of Pisa (1225), Flos, from memory'],
  ['traps', 'pole-edge', '0.095344617200258', 'Burkardt, test_zero collection, problem 4'],
  ['traps', 'cycle-two', '-1.7692923542', 'classic two-cycle of Newton, from memory'],
  [
    'engineering',
    'kepler-ecc0.99-mean0.2',
    '1.066997365282',
    'Meeus, Astronomical Algorithms, chapter 30, from memory',
  ],
  ['engineering', 'parachute', '14.780', 'Chapra and Canale, from memory'],
  ['engineering', 'colebrook-tube', '0.028967810', 'Chapra, Applied Numerical Methods, from memory'],
];

describe('built-in roots', () => {
  it.each(published)('%s: %s is the published %s to its last digit (%s)', (suite, id, value) => {
    const lastDigit = new Decimal(10).pow(-new Decimal(value).decimalPlaces());
    const distance = new Decimal(rootOf(suite, id)).minus(value).abs();
    // Printed values are rounded or cut at their last digit.
    expect(distance.lt(lastDigit)).toBe(true);
  });

  // Alefeld, Potra and Shi (1995), Table I: closed forms, worked out here in binary64.
  it.each([
    ['aps-05', Math.PI / 6],
    ['aps-12-n33', 33],
    ['aps-11-n20', 1 / 20],
    ['aps-15-n1000', (2e-3 * Math.log(1.859)) / 1001],
    ['aps-04-n4-a0.2', 0.2 ** 0.25],
  ])('%s is its closed form', (id, value) => {
    // Three roundings in the closed form, each half an ulp.
    expect(Math.abs(Number(rootOf('brackets', id)) / value - 1)).toBeLessThan(8e-16);
  });
});
