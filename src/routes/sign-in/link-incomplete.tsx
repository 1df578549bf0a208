import { ButtonLink } from '../../components/ui/button.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { paths } from '../../paths.ts';

/** A mail program has cut the link, or somebody came here by hand. */
export function LinkIncomplete({ children }: { children: string }) {
  return (
    <StateNote
      isProblem
      title="This link is not whole"
      actions={<ButtonLink to={paths.signIn()}>To sign in</ButtonLink>}
    >
      It ends before what it should carry; copy the whole line of the mail into the browser. {children}
    </StateNote>
  );
}
