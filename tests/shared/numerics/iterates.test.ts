import { describe, expect, it } from 'vitest';
import { iteratesOf } from '../../../shared/numerics/iterates.ts';
import { pathOf } from '../../helpers/path-lines.ts';

describe('iteratesOf', () => {
  it('takes the starts and then the steps where steps were reported', () => {
    const path = pathOf(['f', 1, -1], ['f', 2, 2], ['step', 1.25], ['f', 1.25, -0.4], ['step', 1.4]);
    expect(iteratesOf(path, 'start')).toEqual([1, 2, 1.25, 1.4]);
  });

  it('counts a start once that is asked for twice', () => {
    const path = pathOf(['f', 1, -1], ['f', 1, -1], ['f', 2, 2], ['df', 1, 3], ['step', 1.25]);
    expect(iteratesOf(path, 'start')).toEqual([1, 2, 1.25]);
  });

  it('takes no more starts than the solver does', () => {
    const path = pathOf(['f', 1, -1], ['f', 0, -2], ['step', 1.5], ['f', 1.5, 0.25]);
    expect(iteratesOf(path, 'start', 1)).toEqual([1, 1.5]);
  });

  it('does not take the x of the first step for a start', () => {
    const path = pathOf(['fdf', 1, -1, 2], ['f', 1.5, 0.25], ['step', 1.5], ['step', 1.4]);
    expect(iteratesOf(path, 'start')).toEqual([1, 1.5, 1.4]);
  });

  it('keeps steps that come back to an x, so that cycles show', () => {
    const path = pathOf(['fdf', 0, 2, -2], ['step', 1], ['step', 0], ['step', 1]);
    expect(iteratesOf(path, 'start')).toEqual([0, 1, 0, 1]);
  });

  it('takes the steps alone where a bracket is given', () => {
    const path = pathOf(
      ['f', 1, -1],
      ['f', 2, 2],
      ['step', 1.5, 1, 2],
      ['f', 1.5, 0.25],
      ['step', 1.25, 1, 1.5],
    );
    expect(iteratesOf(path, 'bracket')).toEqual([1.5, 1.25]);
    expect(iteratesOf(path, 'both')).toEqual([1.5, 1.25]);
  });

  it('takes every x of f once where no steps were reported, −0 as 0', () => {
    const path = pathOf(['f', 0, 1], ['f', -0, 1], ['fdf', 2, 2, 4], ['df', 9, 1], ['f', 0, 1], ['f', 1, 0]);
    expect(iteratesOf(path, 'start')).toEqual([0, 2, 1]);
  });

  it('is empty for an empty path', () => {
    expect(iteratesOf(pathOf(), 'start')).toEqual([]);
  });
});
