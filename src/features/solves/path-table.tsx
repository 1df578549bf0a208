import { useState } from 'react';
import { Button } from '../../components/ui/button.tsx';
import { formatExact, formatPathDigits, formatValue } from '../../lib/format.ts';
import { firstDifferenceNote } from './difference-words.ts';
import { formatBits, splitDiffering } from './differing-digits.ts';
import { Lane, LaneScale } from './lane.tsx';
import { firstDifferingRow, type PathRow } from './path-rows.ts';
import type { PathLine, SolveSide } from './solve-side.ts';

export interface PathTableProps {
  rows: readonly PathRow[];
  reference: SolveSide | null;
  candidate: SolveSide;
  /** Show the bits of x instead of its decimal. */
  isHex: boolean;
}

const shownAtFirst = 200;

function valueText(line: PathLine): string {
  if (line.event.kind === 'df') return `f′ ${formatValue(line.event.a)}`;
  if (line.event.kind === 'd2f') return `f″ ${formatValue(line.event.a)}`;
  if (line.event.kind === 'fdf') return `${formatValue(line.event.a)}, f′ ${formatValue(line.event.b)}`;
  return formatValue(line.event.a);
}

interface HalfProps {
  line: PathLine | null;
  other: PathLine | null;
  isReference: boolean;
  isHex: boolean;
  cellClass: string;
  /** There are two halves, and this one is the right one. */
  isRight: boolean;
}

function Half({ line, other, isReference, isHex, cellClass, isRight }: HalfProps) {
  const first = isRight ? `mid ${cellClass}` : cellClass;
  const void_ = line === null ? 'void' : '';
  const write = (one: PathLine): string => (isHex ? formatBits(one.event.x) : formatExact(one.event.x));
  const figure =
    line === null
      ? null
      : other === null
        ? { same: write(line), differs: '' }
        : splitDiffering(write(line), write(other))[0];
  return (
    <>
      <td className={`${first} ${void_} text-ink-3`}>
        {line === null
          ? ''
          : line.lastNumber > line.number
            ? `${line.number},${line.lastNumber}`
            : line.number}
      </td>
      <td className={`${cellClass} ${void_} ${isReference ? 'ref-x' : ''}`}>
        {figure === null ? (
          <span className="text-ink-3">·</span>
        ) : (
          <>
            {figure.same}
            {figure.differs !== '' && <span className="differs">{figure.differs}</span>}
          </>
        )}
      </td>
      <td
        className={`${cellClass} ${void_} text-ink-2 ${line?.again === null ? 'not-narrow' : 'max-wide:text-right'}`}
      >
        {line === null ? (
          ''
        ) : line.again !== null ? (
          <span className="font-sans text-[12px] text-worse">again, as in {line.again}</span>
        ) : (
          valueText(line)
        )}
      </td>
      <td className={`${cellClass} ${void_} r ${line?.again === null ? '' : 'not-narrow'}`}>
        {line === null ? (
          ''
        ) : line.again !== null ? (
          <span className="text-ink-3">–</span>
        ) : (
          formatPathDigits(line.digits)
        )}
      </td>
      <td className={`${cellClass} ${void_} not-narrow`} style={{ paddingRight: 12 }}>
        <Lane
          digits={line?.digits ?? null}
          isAgain={line !== null && line.again !== null}
          isReference={isReference}
        />
      </td>
    </>
  );
}

function HalfHead({ label, isRight }: { label: string; isRight: boolean }) {
  return (
    <>
      <th scope="col" className={isRight ? 'mid' : ''}>
        <span className="sr-only">number</span>
      </th>
      <th scope="col">{label}</th>
      <th scope="col">f(x)</th>
      <th scope="col" className="r">
        digits
      </th>
      <th scope="col">
        <span className="sr-only">digits, drawn</span>
        <LaneScale />
      </th>
    </>
  );
}

function endText(side: SolveSide): string {
  const { solve } = side;
  const root = solve.root === null ? solve.outcome : `root ${formatExact(solve.root)}`;
  const steps = side.steps > 0 ? `, ${side.steps} steps` : '';
  const residual = solve.residual === null ? '' : `, f = ${formatValue(solve.residual)}`;
  return `${root}${steps}${residual}`;
}

/** Both paths side by side, aligned by x; what differs is set off, the first difference has a line across. */
export function PathTable({ rows, reference, candidate, isHex }: PathTableProps) {
  const [isWhole, setIsWhole] = useState(false);
  const isPair = reference !== null;
  const first = isPair ? firstDifferingRow(rows) : -1;
  const note = first < 0 ? null : firstDifferenceNote(rows, first);
  const shown = isWhole ? rows : rows.slice(0, Math.max(shownAtFirst, first + 20));
  const half = (
    <>
      <col style={{ width: 44 }} />
      <col style={{ width: 178 }} />
      <col />
      <col style={{ width: 52 }} />
      <col style={{ width: 164 }} />
    </>
  );
  // The note stands beside as many rows as it needs, so that it does not push the first of them apart.
  const noteRows = Math.max(1, Math.min(9, shown.length - first));
  return (
    <>
      <table className="table path-table over stack">
        <colgroup>
          <col className="over-column" />
          {isPair && half}
          {half}
        </colgroup>
        <thead>
          <tr>
            <td className="aside" />
            {isPair && <HalfHead label="reference asks at x" isRight={false} />}
            <HalfHead label={isPair ? 'candidate asks at x' : 'asks at x'} isRight={isPair} />
          </tr>
        </thead>
        <tbody>
          {shown.map((row, index) => {
            const isFirst = index === first;
            const cellClass = isFirst ? 'first-cell' : '';
            const isBesideNote = first >= 0 && index > first && index < first + noteRows;
            return (
              <tr
                key={`${row.reference?.number ?? ''} ${row.candidate?.number ?? ''}`}
                id={isFirst ? 'first-difference' : undefined}
                className={isFirst ? 'first' : undefined}
                data-differs={row.isSame ? undefined : ''}
                tabIndex={row.isSame ? undefined : -1}
              >
                {isFirst && note !== null ? (
                  <td className="aside" rowSpan={noteRows}>
                    <b className="block text-ink">{note.title}</b>
                    {note.text}
                  </td>
                ) : isBesideNote ? null : (
                  <td className="aside" />
                )}
                {isPair && (
                  <Half
                    line={row.reference}
                    other={row.candidate}
                    isReference
                    isHex={isHex}
                    cellClass={cellClass}
                    isRight={false}
                  />
                )}
                <Half
                  line={row.candidate}
                  other={row.reference}
                  isReference={false}
                  isHex={isHex}
                  cellClass={cellClass}
                  isRight={isPair}
                />
              </tr>
            );
          })}
          <tr className="sum">
            <td className="aside" style={{ borderTop: 0 }} />
            {isPair && (
              <td colSpan={5} className="all-columns">
                {endText(reference)}
              </td>
            )}
            <td colSpan={5} className={isPair ? 'mid all-columns' : 'all-columns'}>
              {endText(candidate)}
            </td>
          </tr>
        </tbody>
      </table>
      {shown.length < rows.length && (
        <div className="no-print pt-3">
          <Button onClick={() => setIsWhole(true)}>Show the other {rows.length - shown.length} lines</Button>
        </div>
      )}
    </>
  );
}
