import { useQuery } from '@tanstack/react-query';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { formatCount } from '../../lib/format.ts';
import { formatBytes } from '../../lib/format-bytes.ts';
import { kitHref, kitsQuery } from './guide.queries.ts';

/** The adapter kits to download, with what is in each. */
export function KitList() {
  const kits = useQuery(kitsQuery);
  return (
    <QueryState
      query={kits}
      what="the kits"
      isEmpty={({ items }) => items.length === 0}
      empty={
        <StateNote title="No kit here">Write the adapter from scratch; it is about forty lines.</StateNote>
      }
    >
      {({ items }) => (
        <ul className="finds my-2 max-w-[100ch]">
          {items.map((kit) => (
            <li key={kit.name}>
              <a href={kitHref(kit.name)} download className="font-medium">
                {kit.name}.tar.gz
              </a>
              <span>
                {kit.title}, {formatCount(kit.files.length, 'file')},{' '}
                <span className="num">{formatBytes(kit.bytes)}</span>
                <span className="block font-mono text-[12px] wrap-anywhere text-ink-3">
                  {kit.files.join('  ')}
                </span>
              </span>
            </li>
          ))}
        </ul>
      )}
    </QueryState>
  );
}
