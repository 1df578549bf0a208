import { useRef } from 'react';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { ChangeMark } from '../../components/marks/change-mark.tsx';
import { changeColour } from '../../components/marks/change-words.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { CodeBeside } from '../../features/comparisons/code-beside.tsx';
import { countWords, groupPairs, matchText } from '../../features/comparisons/pair-groups.ts';
import { PairsTable } from '../../features/comparisons/pairs-table.tsx';
import { PairPicture } from '../../features/runs/pair-picture.tsx';
import { formatCount, formatFigure } from '../../lib/format.ts';
import { moveRowFocus } from '../../lib/row-focus.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';

export interface ComparisonPairsProps {
  pairs: PairView[];
  cases: readonly SuiteCase[];
  pairHref: (pair: PairView) => string;
  candidate: number;
  base: RunBase;
}

function saidOfSame(same: readonly PairView[]): string {
  const bySolver = new Map<string, number>();
  for (const pair of same) bySolver.set(pair.solver, (bySolver.get(pair.solver) ?? 0) + 1);
  return [...bySolver].map(([solver, count]) => `${solver} ${count}`).join(', ');
}

/** The pairs with their filters: changed ones by gravity, the others folded into one row that says how many. */
export function ComparisonPairs({ pairs, cases, pairHref, candidate, base }: ComparisonPairsProps) {
  const view = useViewState();
  const textField = useRef<HTMLInputElement>(null);
  const caseOf = new Map(cases.map((suiteCase) => [suiteCase.id, suiteCase]));
  const chosen = view.list('change');
  const text = view.get('text');
  const sort = view.get('sort') === 'suite' ? 'suite' : 'gravity';
  const groups = groupPairs(pairs, { text, changes: chosen, sort });
  const words = countWords(pairs);
  const same = matchText(pairs, text).filter((pair) => pair.change === 'same');
  const isSameShown = chosen.includes('same');
  const changed = pairs.filter((pair) => pair.change !== 'same').length;
  const standard = words.map((word) => word.change).filter((change) => change !== 'same');
  const effective: string[] = chosen.length === 0 ? standard : chosen;
  // Nothing in the address means all changed pairs; so a word that is pressed is switched off alone.
  const flip = (change: string): void => {
    view.change('change', (now) => {
      const shown: string[] = now.length === 0 ? standard : now;
      const next = shown.includes(change) ? shown.filter((word) => word !== change) : [...shown, change];
      const isStandard = next.length === standard.length && standard.every((word) => next.includes(word));
      if (isStandard) return [];
      return next.length === 0 ? ['none'] : next.filter((word) => word !== 'none');
    });
  };
  const clear = (): void => view.clear('text', 'change', 'open');
  const flipSort = (): void => view.set({ sort: sort === 'suite' ? '' : 'suite' });
  const hasCode = view.get('code') !== 'hidden';
  const flipCode = (): void => view.set({ code: hasCode ? 'hidden' : '' });
  const showSame = (): void =>
    view.set({ change: words.map((word) => word.change), open: [...view.list('open'), 'same'] });
  useKeys({
    j: () => moveRowFocus(1),
    k: () => moveRowFocus(-1),
    f: () => textField.current?.focus(),
    o: flipSort,
    x: clear,
    c: flipCode,
    ...Object.fromEntries(
      words.slice(0, 9).map((word, index) => [String(index + 1), () => flip(word.change)]),
    ),
  });
  return (
    <>
      <Entry
        title="Pairs"
        note={
          <>
            <p>
              {formatFigure(pairs.length)}, of which {formatFigure(changed)} changed.
            </p>
            <p>The reference is above, the candidate below, here and on every page.</p>
          </>
        }
      >
        <div className="no-print flex flex-wrap items-center gap-x-4.5 gap-y-1.5 pb-3">
          <Field
            ref={textField}
            label="Narrow by solver, case or trait"
            isLabelHidden
            type="search"
            className="w-[232px] max-wide:w-full"
            placeholder="solver, case, trait: e.g. hybrid flat"
            value={text}
            onChange={(event) => view.set({ text: event.target.value })}
          />
          {words.map(({ change, count }) => (
            <FilterWord
              key={change}
              word={change}
              count={count}
              mark={<ChangeMark change={change} />}
              colour={changeColour[change]}
              isPressed={effective.includes(change)}
              onPress={() => flip(change)}
            />
          ))}
          <TextAction hotkey="c" onClick={flipCode} className="text-table">
            {hasCode ? 'without the code' : 'with the code'}
          </TextAction>
          <TextAction hotkey="o" onClick={flipSort} className="text-table">
            {sort === 'gravity' ? 'sorted by gravity, then by cost' : 'sorted by gravity, then as the suite'}
          </TextAction>
        </div>
      </Entry>
      <section className="ledger" aria-label="Table of pairs">
        <div className="max-wide:hidden" />
        <div className={hasCode ? 'beside-grid' : 'min-w-0 max-w-[980px]'}>
          <div className="min-w-0">
            {groups.length === 0 ? (
              <StateNote
                title={changed === 0 && text === '' ? 'No pair changed' : 'No pair matches'}
                actions={
                  changed === 0 && text === '' ? undefined : (
                    <Button hotkey="x" onClick={clear}>
                      Clear the filter
                    </Button>
                  )
                }
              >
                {changed === 0 && text === ''
                  ? `${formatCount(same.length, 'pair')} ${same.length === 1 ? 'is' : 'are'} the same to the last bit.`
                  : `No pair has these words and one of these changes. ${formatCount(same.length, 'pair')} that match did not change and are hidden.`}
              </StateNote>
            ) : (
              <PairsTable
                groups={groups}
                open={view.list('open')}
                onOpen={(change) => view.toggle('open', change)}
                equationOf={(pair) => caseOf.get(pair.case)?.equation ?? ''}
                pairHref={pairHref}
                renderStrips={(pair) => (
                  <PairPicture
                    reference={pair.reference}
                    candidate={pair.candidate}
                    suiteCase={caseOf.get(pair.case)}
                  />
                )}
              />
            )}
            {!isSameShown && same.length > 0 && (
              <p className="border-b border-rule py-3 text-table">
                <TextAction onClick={showSame}>
                  Show the {formatCount(same.length, 'pair')} that did not change
                </TextAction>{' '}
                <span className="text-ink-3">{saidOfSame(same)}</span>
              </p>
            )}
          </div>
          {hasCode && (
            // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by the keyboard
            <section className="code-beside" aria-label="Code beside" tabIndex={0}>
              <h3 className="text-body font-medium">Code beside</h3>
              <CodeBeside candidate={candidate} base={base} pairs={pairs} />
            </section>
          )}
        </div>
      </section>
    </>
  );
}
