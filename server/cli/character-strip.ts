/** One stroke of a strip: an evaluation at `digits` correct digits, or asked again where `isRepeat`. */
export interface CharacterStroke {
  digits: number;
  isRepeat: boolean;
}

const cellsPerDigit = 4;
const lastDigit = 16;

/**
 * A digit strip in characters: the scale, the strokes (`|` one evaluation, `‖` several in the same place),
 * the feet below (`ˌ` asked again at an x asked before), and the end: `●` at the returned root, `⊂` where
 * none was returned.
 */
export function characterStrip(
  strokes: readonly CharacterStroke[],
  end: { digits: number; isOpen: boolean },
): string {
  const width = cellsPerDigit * lastDigit + 1;
  const marks = new Array<number>(width).fill(0);
  const feet = new Array<boolean>(width).fill(false);
  for (const { digits, isRepeat } of strokes) {
    const at = cellOf(digits);
    if (isRepeat) feet[at] = true;
    else marks[at] = (marks[at] ?? 0) + 1;
  }
  const endAt = cellOf(end.digits);
  const line = marks.map((count, at) => {
    if (count > 1) return '‖';
    if (count === 1) return '|';
    return at <= endAt ? '─' : '·';
  });
  const scale = [0, 4, 8, 12, 16].map((digit) => String(digit).padEnd(4 * cellsPerDigit)).join('');
  const rows = [scale.trimEnd(), `${line.join('')}  ${end.isOpen ? '⊂' : '●'}`];
  if (feet.some(Boolean))
    rows.push(
      feet
        .map((isFoot) => (isFoot ? 'ˌ' : ' '))
        .join('')
        .trimEnd(),
    );
  return rows.join('\n');
}

function cellOf(digits: number): number {
  return Math.round(Math.min(lastDigit, Math.max(0, digits)) * cellsPerDigit);
}
