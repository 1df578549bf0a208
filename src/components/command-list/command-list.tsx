import { type KeyboardEvent, useEffect, useId, useRef, useState } from 'react';
import { type Command, rankCommands } from './rank-commands.ts';

export interface CommandListProps {
  commands: readonly Command[];
  /** Still being read: what is there can be chosen already. */
  isReading: boolean;
  onChoose: (command: Command) => void;
  onClose: () => void;
}

const mostShown = 60;

/** Type a part of a name, choose with the arrows, go there with enter. In a dialog of the browser's own. */
export function CommandList({ commands, isReading, onChoose, onClose }: CommandListProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const list = useRef<HTMLDivElement>(null);
  const id = useId();
  const [typed, setTyped] = useState('');
  const [at, setAt] = useState(0);
  const found = rankCommands(commands, typed).slice(0, mostShown);
  const chosen = Math.min(at, found.length - 1);
  useEffect(() => {
    if (dialog.current?.open === false) dialog.current.showModal();
  }, []);
  useEffect(() => {
    list.current?.children[chosen]?.scrollIntoView({ block: 'nearest' });
  }, [chosen]);
  function handleKeyDown(event: KeyboardEvent): void {
    const steps: Record<string, number> = {
      ArrowDown: chosen + 1,
      ArrowUp: chosen - 1,
      PageDown: Math.min(chosen + 8, found.length - 1),
      PageUp: Math.max(chosen - 8, 0),
    };
    const next = steps[event.key];
    if (next !== undefined) {
      event.preventDefault();
      if (found.length > 0) setAt((next + found.length) % found.length);
      return;
    }
    const command = found[chosen];
    if (event.key === 'Enter' && command !== undefined) {
      event.preventDefault();
      onChoose(command);
    }
  }
  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: pressing beside it is for the pointer; Escape closes it too
    <dialog
      ref={dialog}
      aria-label="Go to"
      onClose={onClose}
      onClick={(event) => {
        if (event.target === dialog.current) dialog.current.close();
      }}
      className="mx-auto mt-[9vh] mb-0 w-[min(640px,calc(100vw-32px))] max-w-none border border-ink bg-paper p-0 text-ink backdrop:bg-ink/30"
    >
      <div className="px-4 pb-2 pt-3">
        <input
          type="text"
          role="combobox"
          aria-expanded="true"
          aria-controls={id}
          aria-autocomplete="list"
          aria-activedescendant={chosen >= 0 ? `${id}-${chosen}` : undefined}
          aria-label="Library, build, suite, case or page"
          placeholder="Library, build, suite, case or page"
          autoComplete="off"
          spellCheck={false}
          value={typed}
          onChange={(event) => {
            setTyped(event.target.value);
            setAt(0);
          }}
          onKeyDown={handleKeyDown}
          className="w-full border-b border-rule-strong bg-transparent py-1.5 text-[16px] leading-[22px] placeholder:text-ink-3 placeholder:opacity-100 focus:border-ink"
        />
        <p role="status" className="pt-1.5 text-note text-ink-3">
          {isReading
            ? 'Reading what there is …'
            : found.length === 0
              ? 'Nothing has that in its name.'
              : `${found.length === mostShown ? `The first ${mostShown}` : `${found.length} found`}; arrows choose, enter opens, escape leaves.`}
        </p>
      </div>
      <div
        ref={list}
        id={id}
        role="listbox"
        aria-label="Found"
        tabIndex={-1}
        className="max-h-[52vh] overflow-y-auto border-t border-rule"
      >
        {found.map((command, index) => (
          // biome-ignore lint/a11y/useKeyWithClickEvents: the keys are the field's
          // biome-ignore lint/a11y/useFocusableInteractive: the field keeps the focus and names the option
          <div
            key={`${command.kind} ${command.to} ${command.name}`}
            id={`${id}-${index}`}
            role="option"
            aria-selected={index === chosen}
            onClick={() => onChoose(command)}
            onPointerMove={() => setAt(index)}
            className={`grid cursor-pointer grid-cols-[58px_minmax(0,1fr)] gap-3 border-b border-rule px-4 py-[5px] ${index === chosen ? 'bg-sunk shadow-[inset_3px_0_0_var(--ink)]' : ''}`}
          >
            <span className="text-note leading-5 text-ink-3">{command.kind}</span>
            <span className="truncate">
              <span className="font-medium">{command.name}</span>{' '}
              <span className="text-table text-ink-3">{command.about}</span>
            </span>
          </div>
        ))}
      </div>
    </dialog>
  );
}
