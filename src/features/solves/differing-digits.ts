export interface SplitFigure {
  same: string;
  differs: string;
}

const exponentOf = (text: string): string => text.split(/e/i)[1] ?? '';

/**
 * Splits two figures at the first place that differs, so that it can be set off. Where sign, exponent or the
 * place of the point differ, the whole figure does.
 */
export function splitDiffering(left: string, right: string): [SplitFigure, SplitFigure] {
  if (left === right) return [whole(left, ''), whole(right, '')];
  const pointOf = (text: string): number =>
    text.includes('.') ? text.indexOf('.') : (text.split(/e/i)[0]?.length ?? 0);
  const isComparable = exponentOf(left) === exponentOf(right) && pointOf(left) === pointOf(right);
  let common = 0;
  if (isComparable) {
    while (common < left.length && common < right.length && left[common] === right[common]) common += 1;
  }
  return [
    whole(left.slice(0, common), left.slice(common)),
    whole(right.slice(0, common), right.slice(common)),
  ];
}

function whole(same: string, differs: string): SplitFigure {
  return { same, differs };
}

/** The bits of a binary64 as sixteen hexadecimal digits. */
export function formatBits(value: number): string {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  return view.getBigUint64(0).toString(16).padStart(16, '0');
}
