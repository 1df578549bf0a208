import { Entry } from '../components/sheet/entry.tsx';
import { Page } from '../components/sheet/page.tsx';
import { ButtonLink } from '../components/ui/button.tsx';
import { StateNote } from '../components/ui/state-note.tsx';
import { paths } from '../paths.ts';

/** An address that leads nowhere. */
export function MissingPage() {
  return (
    <Page title="Nothing here" trail={[{ label: 'Nothing here' }]}>
      <Entry title="Nothing here">
        <StateNote
          isProblem
          title="There is no page at this address"
          actions={<ButtonLink to={paths.libraries()}>To the libraries</ButtonLink>}
        >
          It may have been written wrongly, or what it named is gone.
        </StateNote>
      </Entry>
    </Page>
  );
}
