import { useState } from 'react';
import type { MadeTokenView } from '../../../shared/schemas/tokens.ts';
import { Button } from '../../components/ui/button.tsx';

/** The token itself, once. */
export function NewToken({ made, onDone }: { made: MadeTokenView; onDone: () => void }) {
  const [isCopied, setIsCopied] = useState<boolean | null>(null);
  function handleCopy(): void {
    navigator.clipboard.writeText(made.token).then(
      () => setIsCopied(true),
      () => setIsCopied(false),
    );
  }
  return (
    <div className="border-t-2 border-ink pb-2 pt-3">
      <h3 className="font-medium">The token “{made.made.name}”, shown this once</h3>
      <p className="text-ink-2">
        Put it where your pipeline keeps its secrets. Tallyroot keeps only what it needs to know it again.
      </p>
      <p className="my-2.5 border-l-[3px] border-ink bg-sheet px-3 py-2">
        <code className="wrap-anywhere text-figure">{made.token}</code>
      </p>
      <p className="mb-2.5 text-note text-ink-3">
        Sent with each request as <code>authorization: Bearer …</code>
      </p>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button isMain onClick={handleCopy}>
          Copy it
        </Button>
        <Button onClick={onDone}>I have it</Button>
        <span role="status" className="text-note text-ink-3">
          {isCopied === true && 'Copied.'}
          {isCopied === false && 'The browser does not let it be copied; mark it and copy it by hand.'}
        </span>
      </div>
    </div>
  );
}
