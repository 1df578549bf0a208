import { useQuery } from '@tanstack/react-query';
import { Link, useNavigate, useParams } from 'react-router';
import type { BuildPreviewView } from '../../../shared/schemas/builds.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Choice } from '../../components/ui/choice.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { previewQuery } from '../../features/builds/build-sources.queries.ts';
import { buildsQuery } from '../../features/builds/builds.queries.ts';
import { SourceArchive } from '../../features/builds/source-archive.tsx';
import { SourceFolder } from '../../features/builds/source-folder.tsx';
import { SourceGit } from '../../features/builds/source-git.tsx';
import { libraryQuery } from '../../features/libraries/libraries.queries.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';
import { useMayIn } from '../use-may-in.ts';
import { PreviewSheet } from './preview-sheet.tsx';

const sources = [
  { value: 'git', label: 'a repository' },
  { value: 'archive', label: 'an archive' },
  { value: 'folder', label: 'a folder here' },
] as const;

function Sources({
  library,
  onPreview,
}: {
  library: string;
  onPreview: (preview: BuildPreviewView) => void;
}) {
  const view = useViewState();
  const builds = useQuery(buildsQuery(library));
  const asked = view.get('source');
  const source = sources.find((one) => one.value === asked)?.value ?? 'git';
  return (
    <>
      <VerdictBlock
        sign="register a build"
        sentence="Where does the build come from?"
        lead={
          <>
            Tallyroot reads its <code className="text-figure">tallyroot.yaml</code> and shows what it will run
            before anything is run. <Link to={paths.guideChapter('manifest')}>How a manifest is written</Link>
          </>
        }
      >
        <div className="mt-4">
          <Choice
            legend="Where the build comes from"
            name="source"
            options={sources}
            value={source}
            onChange={(value) => view.set({ source: value === 'git' ? '' : value })}
          />
        </div>
      </VerdictBlock>
      <Entry title="Source" note="The same commit or the same contents is never registered twice.">
        {source === 'archive' && <SourceArchive library={library} onPreview={onPreview} />}
        {source === 'folder' && <SourceFolder library={library} onPreview={onPreview} />}
        {source === 'git' && (
          <QueryState query={builds} what="the builds">
            {(list) => (
              <SourceGit
                library={library}
                knownAddress={list.find((build) => build.address !== null)?.address ?? ''}
                onPreview={onPreview}
              />
            )}
          </QueryState>
        )}
      </Entry>
    </>
  );
}

/** Registers a build: a source, then what it would run, then the build itself. */
export function RegisterPage() {
  const library = useParams().library ?? '';
  const view = useViewState();
  const navigate = useNavigate();
  const id = Number(view.get('preview')) || null;
  const preview = useQuery({ ...previewQuery(library, id ?? 0), enabled: id !== null });
  const canRegister = useMayIn(library)('build.register');
  const known = useQuery(libraryQuery(library));
  const another = (): void => view.clear('preview');
  useKeys({ escape: () => (id === null ? void navigate(paths.library(library)) : another()) });
  return (
    <Page
      title={`Register a build of ${library}`}
      trail={[
        { label: 'Libraries', to: paths.libraries() },
        { label: library, to: paths.library(library) },
        { label: 'Register a build' },
      ]}
      keys={[{ keys: ['esc'], does: id === null ? 'back to the library' : 'another source' }]}
    >
      {known.data !== undefined && !canRegister ? (
        <Entry title="Register a build">
          <StateNote title="Only members register builds">
            Ask a maintainer of {library} to make you a member.
          </StateNote>
        </Entry>
      ) : id === null ? (
        <Sources library={library} onPreview={(made) => view.set({ preview: String(made.id) })} />
      ) : preview.data === undefined ? (
        <Entry title="Preview">
          <QueryState query={preview} what="the preview">
            {() => null}
          </QueryState>
          {preview.isError && <Button onClick={another}>Look at a source again</Button>}
        </Entry>
      ) : (
        <PreviewSheet library={library} preview={preview.data} onAnother={another} />
      )}
    </Page>
  );
}
