import { useQuery } from '@tanstack/react-query';
import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TokenForm } from '../../features/tokens/token-form.tsx';
import { TokenTable } from '../../features/tokens/token-table.tsx';
import { tokensQuery } from '../../features/tokens/tokens.queries.ts';

/** Tokens for the programs that work for this library. */
export function TokensSection({ library }: { library: LibraryView }) {
  const query = useQuery(tokensQuery(library.slug));
  return (
    <>
      <Entry
        title="New token"
        note={
          <>
            <p>For a program that registers builds or reads results; for this library alone.</p>
            <p>It is shown once. What it may do cannot be changed later: make another one.</p>
          </>
        }
      >
        <TokenForm library={library.slug} />
      </Entry>
      <Entry title="Tokens" note="One that has not been used for long is best revoked.">
        <QueryState
          query={query}
          what="the tokens"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote title="No token yet">
              Those that you make are listed here, with their last use.
            </StateNote>
          }
        >
          {(list) => <TokenTable library={library.slug} tokens={list} />}
        </QueryState>
      </Entry>
    </>
  );
}
