import { useNavigate } from 'react-router';
import { createLibraryBody } from '../../../shared/schemas/libraries.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { LibraryForm } from '../../features/libraries/library-form.tsx';
import { useCreateLibrary } from '../../features/libraries/library-mutations.ts';
import { useReadMeAgain } from '../../features/session/session.queries.ts';
import { paths } from '../../paths.ts';

/** Takes a library under care. */
export function NewLibraryPage() {
  const create = useCreateLibrary();
  const readMeAgain = useReadMeAgain();
  const navigate = useNavigate();
  return (
    <Page
      title="Create a library"
      trail={[{ label: 'Libraries', to: paths.libraries() }, { label: 'Create a library' }]}
    >
      <VerdictBlock
        sign="New library"
        colour="text-ink"
        sentence="Which solvers do you want to look after?"
        lead="You become its maintainer. Next you register a build; its manifest says which solvers there are."
      />
      <Entry
        title="Library"
        note="Private is the safe choice: it can be made public later, and its members stay the same."
      >
        <LibraryForm
          schema={createLibraryBody}
          first={{ name: '', slug: '', description: '', homepage: '', visibility: 'private' }}
          hasSlug
          action="Create the library"
          isBusy={create.isPending}
          error={create.error}
          onSubmit={(body) =>
            create.mutate(body, {
              onSuccess: async ({ slug }) => {
                await readMeAgain();
                void navigate(paths.library(slug));
              },
            })
          }
        />
      </Entry>
    </Page>
  );
}
