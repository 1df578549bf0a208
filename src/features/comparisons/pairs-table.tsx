import type { ReactNode } from 'react';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import { StripHeader } from '../../components/digit-strip/strip-header.tsx';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { changeMeaning } from '../../components/marks/change-words.ts';
import { TextAction } from '../../components/ui/text-action.tsx';
import type { PairGroup } from './pair-groups.ts';
import { PairRow } from './pair-row.tsx';

export interface PairsTableProps {
  groups: readonly PairGroup[];
  /** Groups shown whole; others fold their smaller pairs. */
  open: readonly string[];
  onOpen: (change: string) => void;
  equationOf: (pair: PairView) => string;
  pairHref: (pair: PairView) => string;
  renderStrips: (pair: PairView) => ReactNode;
}

const shownOf = (group: PairGroup, isOpen: boolean): PairView[] =>
  isOpen || group.pairs.length <= 11 ? group.pairs : group.pairs.slice(0, group.change === 'drifted' ? 4 : 9);

function Aside({ group, rows }: { group: PairGroup; rows: number }) {
  return (
    <td className="aside" rowSpan={rows}>
      <ChangeWord change={group.change} count={group.pairs.length} />
      <span className="block pt-[3px]">{changeMeaning[group.change]}</span>
    </td>
  );
}

function Group(props: PairsTableProps & { group: PairGroup }) {
  const { group } = props;
  const shown = shownOf(group, props.open.includes(group.change));
  const folded = group.pairs.slice(shown.length);
  const rows = shown.length + (folded.length > 0 ? 1 : 0);
  return (
    <>
      {shown.map((pair, index) => (
        <PairRow
          key={pair.key}
          pair={pair}
          equation={props.equationOf(pair)}
          href={props.pairHref(pair)}
          strips={props.renderStrips(pair)}
          aside={index === 0 ? <Aside group={group} rows={rows} /> : null}
        />
      ))}
      {folded.length > 0 && (
        <tr>
          <td colSpan={6} className="all-columns">
            <TextAction onClick={() => props.onOpen(group.change)}>
              {folded.length} more {group.change}
            </TextAction>{' '}
            <span className="text-ink-3">
              {folded
                .slice(0, 3)
                .map((pair) => `${pair.solver} on ${pair.case}`)
                .join(', ')}
              {folded.length > 3 ? ' …' : ''}
            </span>
          </td>
        </tr>
      )}
    </>
  );
}

/** Changed pairs, gravest first. The first column is the margin: the change stands beside its rows. */
export function PairsTable(props: PairsTableProps) {
  return (
    <table className="table table-rows over stack pairs-table table-fixed">
      <colgroup>
        <col className="over-column" />
        <col />
        <col style={{ width: 62 }} />
        <col style={{ width: 62 }} />
        <col style={{ width: 58 }} />
        <col className="order-column" style={{ width: 104 }} />
        <col style={{ width: 200 }} />
      </colgroup>
      <thead>
        <tr>
          <td className="aside" />
          <th scope="col">solver and case</th>
          <th scope="col" className="r">
            evalu-
            <br />
            ations
          </th>
          <th scope="col" className="r">
            more,
            <br />
            fewer
          </th>
          <th scope="col" className="r">
            digits
          </th>
          <th scope="col" className="order-column">
            order
          </th>
          <th scope="col">
            <span className="pl-5">correct digits at each evaluation</span>
            <StripHeader />
          </th>
        </tr>
      </thead>
      {props.groups.map((group) => (
        <tbody key={group.change}>
          <Group {...props} group={group} />
        </tbody>
      ))}
    </table>
  );
}
