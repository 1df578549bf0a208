import { useState } from 'react';
import { useNavigate } from 'react-router';
import type { Visibility } from '../../../shared/permissions.ts';
import { changeLibraryBody, type LibraryView } from '../../../shared/schemas/libraries.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { NamedConfirm } from '../../components/ui/named-confirm.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { LibraryForm } from '../../features/libraries/library-form.tsx';
import { useChangeLibrary } from '../../features/libraries/library-mutations.ts';
import { visibilityWords } from '../../features/libraries/visibility-words.ts';
import { useLeaveLibrary } from '../../features/members/members.queries.ts';
import { roleIn } from '../../features/session/asker.ts';
import { useReadMeAgain } from '../../features/session/session.queries.ts';
import { useMay, usePerson } from '../../features/session/use-may.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { paths } from '../../paths.ts';

function Description({ library }: { library: LibraryView }) {
  const change = useChangeLibrary(library.slug);
  return (
    <LibraryForm
      schema={changeLibraryBody}
      first={{
        name: library.name,
        slug: library.slug,
        description: library.description,
        homepage: library.homepage ?? '',
        visibility: library.visibility,
      }}
      hasSlug={false}
      hasVisibility={false}
      action="Save it"
      isBusy={change.isPending}
      error={change.error}
      said={change.isSuccess ? 'Saved.' : null}
      onSubmit={(body) => change.mutate(body)}
    />
  );
}

function VisibilityChange({ library }: { library: LibraryView }) {
  const change = useChangeLibrary(library.slug);
  const [isAsked, setIsAsked] = useState(false);
  const next: Visibility = library.visibility === 'public' ? 'private' : 'public';
  return isAsked ? (
    <NamedConfirm
      name={library.slug}
      action={`Make it ${next}`}
      isBusy={change.isPending}
      problem={sentenceOf(change.error)}
      onConfirm={() => change.mutate({ visibility: next }, { onSuccess: () => setIsAsked(false) })}
      onLeave={() => setIsAsked(false)}
    >
      {next === 'public'
        ? 'Everyone who is signed in can then read all its builds, their source differences, runs and comparisons, those of before too.'
        : 'Everyone but its members loses sight of it at once; addresses that they have kept lead nowhere.'}
    </NamedConfirm>
  ) : (
    <StateNote
      title={`The library is ${library.visibility}`}
      actions={<Button onClick={() => setIsAsked(true)}>Make it {next}</Button>}
    >
      {visibilityWords[library.visibility]}
    </StateNote>
  );
}

function Leave({ library }: { library: LibraryView }) {
  const leave = useLeaveLibrary(library.slug);
  const readMeAgain = useReadMeAgain();
  const navigate = useNavigate();
  const [isAsked, setIsAsked] = useState(false);
  return isAsked ? (
    <NamedConfirm
      name={library.slug}
      action="Leave the library"
      isBusy={leave.isPending}
      problem={sentenceOf(leave.error)}
      onConfirm={() =>
        leave.mutate(undefined, {
          onSuccess: async () => {
            await readMeAgain();
            void navigate(paths.libraries());
          },
        })
      }
      onLeave={() => setIsAsked(false)}
    >
      You lose your role here; only a maintainer can invite you again. What you did stays, under your name.
    </NamedConfirm>
  ) : (
    <StateNote title="Leaving" actions={<Button onClick={() => setIsAsked(true)}>Leave the library</Button>}>
      The only maintainer cannot leave before there is another one.
    </StateNote>
  );
}

/** What the library is called, who sees it, and the ways out. */
export function GeneralSection({ library }: { library: LibraryView }) {
  const may = useMay();
  const person = usePerson();
  const canChange = may('library.settings', library);
  const isMember = roleIn(person, library.slug) !== null;
  return (
    <>
      <Entry
        title="Library"
        note={`Its short name, ${library.slug}, stays: addresses and manifests have it. Created by ${library.createdBy}.`}
      >
        {canChange ? (
          <Description library={library} />
        ) : (
          <StateNote title={library.name}>
            {library.description === '' ? 'It is not described.' : library.description} Only its maintainers
            change this.
          </StateNote>
        )}
      </Entry>
      {(canChange || isMember) && (
        <Entry
          title="With care"
          note="The name of the library has to be typed first. Nothing here deletes results: builds, runs and reference results stay on record."
        >
          <div className="grid gap-4">
            {canChange && <VisibilityChange library={library} />}
            {isMember && <Leave library={library} />}
          </div>
        </Entry>
      )}
    </>
  );
}
