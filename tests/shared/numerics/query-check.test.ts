import { describe, expect, it } from 'vitest';
import { checkQueries, type QueryCheckInput, repeatsOf } from '../../../shared/numerics/query-check.ts';
import { rootReference } from '../../../shared/numerics/root-reference.ts';
import { pathOf } from '../../helpers/path-lines.ts';

const input: QueryCheckInput = {
  bracket: [1, 2],
  takesBracket: true,
  widens: false,
  roots: [{ ref: rootReference('1.5'), attainable: 1e-12 }],
  root: null,
};
const none = { repeated: 0, outside: 0, late: 0, unused: 0, nonFinite: 0 };

describe('checkQueries', () => {
  it('finds nothing in an empty path or a clean one', () => {
    expect(checkQueries(pathOf(), input)).toEqual({ counts: none, findings: [] });
    const clean = pathOf(['f', 1, -1], ['f', 2, 1], ['step', 1.4], ['f', 1.4, -0.1], ['df', 1.4, 2]);
    expect(checkQueries(clean, input).counts).toEqual(none);
  });

  it('finds the same kind of evaluation at a bit-identical x, with the line that asked first', () => {
    const path = pathOf(['f', 1, -1], ['step', 1], ['f', 1, -1], ['df', 1, 2], ['f', 1, -1]);
    const { counts, findings } = checkQueries(path, input);
    expect(counts.repeated).toBe(2);
    expect(findings).toEqual([
      { finding: 'repeated', asked: 'f', index: 2, x: 1, earlier: 0 },
      { finding: 'repeated', asked: 'f', index: 4, x: 1, earlier: 0 },
    ]);
  });

  it('takes −0 and 0 for the same x and neighbours for different ones', () => {
    const outer = { ...input, bracket: null };
    expect(checkQueries(pathOf(['f', 0, 1], ['f', -0, 1]), outer).counts.repeated).toBe(1);
    expect(checkQueries(pathOf(['f', 1, 1], ['f', 1 + 2 ** -52, 1]), outer).counts.repeated).toBe(0);
  });

  it('counts an fdf as one f and one f′', () => {
    const path = pathOf(['f', 1, -1], ['fdf', 1, -1, 2], ['fdf', 1, -1, 2], ['df', 1, 2]);
    expect(checkQueries(path, input).counts.repeated).toBe(4);
  });

  it('finds evaluations outside the bracket, ends included in it', () => {
    const path = pathOf(['f', 1, 1], ['f', 2, 1], ['f', 2.0000000000000004, 1], ['fdf', 0.5, 1, 1]);
    const { counts, findings } = checkQueries(path, { ...input, bracket: [2, 1] });
    expect(counts.outside).toBe(3);
    expect(findings[0]).toMatchObject({ finding: 'outside', index: 2, earlier: null });
  });

  it('finds nothing outside for solvers that widen, that take no bracket or have none', () => {
    const path = pathOf(['f', 5, 1]);
    expect(checkQueries(path, { ...input, widens: true }).counts.outside).toBe(0);
    expect(checkQueries(path, { ...input, takesBracket: false }).counts.outside).toBe(0);
    expect(checkQueries(path, { ...input, bracket: null }).counts.outside).toBe(0);
  });

  it('grants a stopping test two evaluations after the answer and finds the third late', () => {
    const answer = 1.5 + 1.9e-12;
    const two = pathOf(['f', 1.4, -1], ['f', answer, 0], ['f', 1.3, 1], ['f', 1.2, 1]);
    expect(checkQueries(two, input).counts.late).toBe(0);
    const three = pathOf(['f', 1.4, -1], ['f', answer, 0], ['f', 1.3, 1], ['f', 1.2, 1], ['f', 1.1, 1]);
    expect(checkQueries(three, input).counts.late).toBe(1);
    expect(checkQueries(three, input).findings).toEqual([
      { finding: 'late', asked: 'f', index: 4, x: 1.1, earlier: 1 },
    ]);
  });

  it('does not take an x beyond twice the attainable accuracy for the answer', () => {
    const path = pathOf(['f', 1.5 + 2.1e-12, 0], ['f', 1.3, 1], ['f', 1.2, 1], ['f', 1.1, 1]);
    expect(checkQueries(path, input).counts.late).toBe(0);
  });

  it('finds a derivative unused where f is 0 at the last x and that x is returned', () => {
    const path = pathOf(['f', 1.25, 1], ['df', 1.25, 1], ['f', 1.75, 0], ['df', 1.75, 1]);
    const { counts, findings } = checkQueries(path, { ...input, root: 1.75 });
    expect(counts.unused).toBe(1);
    expect(findings[0]).toMatchObject({ finding: 'unused', asked: 'df', index: 3 });
  });

  it('does not call a derivative unused where it may have decided that the solver stops', () => {
    const path = pathOf(['f', 1.75, 1e-17], ['df', 1.75, 1]);
    expect(checkQueries(path, { ...input, root: 1.75 }).counts.unused).toBe(0);
    const stepped = pathOf(['f', 1.75, 0], ['df', 1.75, 1], ['step', 1.8]);
    expect(checkQueries(stepped, { ...input, root: 1.75 }).counts.unused).toBe(0);
    expect(checkQueries(path, { ...input, root: 1.7 }).counts.unused).toBe(0);
    expect(checkQueries(path, { ...input, root: null }).counts.unused).toBe(0);
  });

  it('finds questions at an x that is not finite and answers that are not', () => {
    const path = pathOf(['f', Number.NaN, 1], ['f', Number.POSITIVE_INFINITY, 1], ['fdf', 1, 1, Number.NaN]);
    const { counts } = checkQueries(path, input);
    expect(counts.nonFinite).toBe(3);
    expect(counts.outside).toBe(0);
  });
});

describe('repeatsOf', () => {
  it('gives each line the one that it repeats', () => {
    const path = pathOf(
      ['f', 1, 1],
      ['fdf', 1, 1, 2],
      ['step', 1],
      ['fdf', 1, 1, 2],
      ['f', 1, 1],
      ['df', 2, 1],
    );
    expect(repeatsOf(path.events)).toEqual([null, null, null, 0, 0, null]);
  });
});
