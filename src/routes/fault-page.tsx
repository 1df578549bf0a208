import { useRouteError } from 'react-router';
import { Button } from '../components/ui/button.tsx';
import { StateNote } from '../components/ui/state-note.tsx';

/** What is shown when a page itself fails: a piece of the client could not be read, or has a fault. */
export function FaultPage() {
  const error = useRouteError();
  return (
    <div className="sheet">
      <main className="ledger entry">
        <div />
        <StateNote
          isProblem
          title="This page could not be drawn"
          actions={<Button onClick={() => window.location.reload()}>Load it again</Button>}
        >
          Nothing was lost: results are kept by the server. {error instanceof Error ? error.message : ''}
        </StateNote>
      </main>
    </div>
  );
}
