import { checkQueries, type QueryEvent } from '../../../shared/numerics/query-check.ts';
import { rootReference } from '../../../shared/numerics/root-reference.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { QueryFinding } from '../../../shared/schemas/words.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatExact, formatFigure } from '../../lib/format.ts';
import type { SolveSide } from './solve-side.ts';

export interface FindingRow {
  term: string;
  pieces: TextPiece[];
  /** Nothing was noticed. */
  isQuiet: boolean;
}

const terms: Record<QueryFinding, string> = {
  repeated: 'asked again',
  outside: 'outside',
  late: 'late',
  unused: 'unused',
  nonFinite: 'non-finite',
};
const order: readonly QueryFinding[] = ['repeated', 'outside', 'late', 'unused', 'nonFinite'];

const figure = (text: string): TextPiece => ({ text, figure: true });
const plain = (text: string): TextPiece => ({ text });

function findingsOf(side: SolveSide, suiteCase: SuiteCase | undefined): QueryEvent[] {
  const { declaration } = side.solve;
  return checkQueries(side.path, {
    bracket: suiteCase?.bracket == null ? null : [Number(suiteCase.bracket[0]), Number(suiteCase.bracket[1])],
    takesBracket: declaration.takes === 'bracket' || declaration.takes === 'both',
    widens: declaration.widens,
    roots: (suiteCase?.roots ?? [])
      .filter((root) => root.allowed)
      .map((root) => ({ ref: rootReference(root.value), attainable: root.attainable })),
    root: side.solve.root,
  }).findings;
}

function firstPlace(side: SolveSide, event: QueryEvent | undefined): TextPiece[] {
  const line = event === undefined ? undefined : side.lines[event.index];
  if (line === undefined) return [];
  const known = line.again === null ? [] : [plain(', known from '), figure(String(line.again))];
  return [
    plain(', first at evaluation '),
    figure(String(line.number)),
    plain(' (x = '),
    figure(formatExact(line.event.x)),
    ...known,
    plain(')'),
  ];
}

function what(finding: QueryFinding, count: number): TextPiece[] {
  const times = figure(formatFigure(count));
  const word = count === 1 ? 'evaluation' : 'evaluations';
  if (finding === 'repeated') return [times, plain(` ${word} at a bit-identical x that was asked before`)];
  if (finding === 'outside') return [times, plain(` ${word} outside the bracket that was given`)];
  if (finding === 'late')
    return [times, plain(` ${word} after the answer was there, beyond the two that a stopping test needs`)];
  if (finding === 'unused')
    return [times, plain(` ${word} of a derivative that nothing can have depended on`)];
  return [times, plain(` ${word} at, or answered by, something that is no finite number`)];
}

/** The query check in words, compared with the reference, which may do the same. */
export function findingRows(
  reference: SolveSide | null,
  candidate: SolveSide,
  suiteCase: SuiteCase | undefined,
): FindingRow[] {
  const mine = findingsOf(candidate, suiteCase);
  const theirs = reference === null ? [] : findingsOf(reference, suiteCase);
  return order.map((finding) => {
    const own = mine.filter((event) => event.finding === finding);
    const other = theirs.filter((event) => event.finding === finding);
    const compared =
      reference === null
        ? []
        : [
            plain(' The reference: '),
            ...(other.length === 0 ? [plain('none')] : [figure(formatFigure(other.length))]),
            plain('.'),
          ];
    if (own.length === 0 && other.length === 0) {
      return { term: terms[finding], pieces: [plain('nothing')], isQuiet: true };
    }
    const said =
      own.length === 0
        ? [plain('nothing.')]
        : [...what(finding, own.length), ...firstPlace(candidate, own[0]), plain('.')];
    return { term: terms[finding], pieces: [...said, ...compared], isQuiet: own.length === 0 };
  });
}
