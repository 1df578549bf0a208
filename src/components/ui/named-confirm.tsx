import { type FormEvent, type ReactNode, useState } from 'react';
import { Button } from './button.tsx';
import { Field } from './field.tsx';
import { FormAlert } from './form-alert.tsx';

export interface NamedConfirmProps {
  /** What has to be typed, letter by letter. */
  name: string;
  /** What then happens, in the words of the button. */
  action: string;
  children: ReactNode;
  isBusy: boolean;
  problem: string | null;
  onConfirm: () => void;
  onLeave: () => void;
}

/** Asks for the name of what is about to be changed for good, so that nothing goes by a slip of the hand. */
export function NamedConfirm({
  name,
  action,
  children,
  isBusy,
  problem,
  onConfirm,
  onLeave,
}: NamedConfirmProps) {
  const [typed, setTyped] = useState('');
  const isRight = typed.trim() === name;
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    if (isRight) onConfirm();
  }
  return (
    <form onSubmit={handleSubmit} className="max-w-[60em] border-t-2 border-worse pb-4 pt-3">
      <div className="text-ink-2">{children}</div>
      <Field
        label={`Type ${name} to go on`}
        value={typed}
        autoComplete="off"
        spellCheck={false}
        autoFocus
        onChange={(event) => setTyped(event.target.value)}
        className="mt-2.5 max-w-[22em]"
      />
      <div className="mt-2.5 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button type="submit" isMain={isRight} disabled={!isRight || isBusy}>
          {action}
        </Button>
        <Button onClick={onLeave}>Leave it as it is</Button>
        {!isRight && <span className="text-note text-ink-3">The name has to be typed first.</span>}
      </div>
      <div className="pt-2">
        <FormAlert>{problem}</FormAlert>
      </div>
    </form>
  );
}
