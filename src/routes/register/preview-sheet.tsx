import { type FormEvent, useState } from 'react';
import { useNavigate } from 'react-router';
import type { BuildPreviewView } from '../../../shared/schemas/builds.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { RichText, type TextPiece } from '../../components/ui/rich-text.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { useRegisterPreview } from '../../features/builds/build-sources.queries.ts';
import { DeclaredSolvers } from '../../features/builds/declared-solvers.tsx';
import { SourceFacts } from '../../features/builds/preview-facts.tsx';
import { IssueList, ProblemLines } from '../../features/builds/problem-lines.tsx';
import { RecipeList } from '../../features/builds/recipe-list.tsx';
import { formatCommit, formatCount } from '../../lib/format.ts';
import { paths } from '../../paths.ts';

export interface PreviewSheetProps {
  library: string;
  preview: BuildPreviewView;
  onAnother: () => void;
}

function sentence(preview: BuildPreviewView): TextPiece[] {
  const name: TextPiece = { text: formatCommit(preview.commit ?? preview.label), strong: true };
  if (preview.recipe === null) {
    return [
      name,
      { text: ' cannot be registered: its tallyroot.yaml has ' },
      { text: formatCount(preview.issues.length, 'problem'), figure: true },
      { text: '.' },
    ];
  }
  if (preview.existing !== null) return [name, { text: ' is registered already.' }];
  const lines = preview.recipe.prepare.length;
  return [
    name,
    { text: ' declares ' },
    { text: formatCount(preview.recipe.solvers.length, 'solver'), figure: true },
    lines === 0
      ? { text: ' and needs no preparation.' }
      : { text: ` and is prepared by ${formatCount(lines, 'line')}; nothing has been run yet.` },
  ];
}

/** What would be registered: read, shown, not run. */
export function PreviewSheet({ library, preview, onAnother }: PreviewSheetProps) {
  const navigate = useNavigate();
  const register = useRegisterPreview(library);
  const [label, setLabel] = useState('');
  const { recipe, existing } = preview;
  const canRegister = recipe !== null && existing === null;
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    const given = label.trim();
    register.mutate(
      { preview: preview.id, ...(given === '' ? {} : { label: given }) },
      { onSuccess: (build) => void navigate(paths.build(build.id)) },
    );
  }
  return (
    <>
      <VerdictBlock
        sign={recipe === null ? 'not usable' : existing === null ? 'read, not run' : 'known'}
        colour={recipe === null ? 'text-worse' : 'text-ink-2'}
        note={<p>Nothing of it has been run. What is shown is what will be.</p>}
        sentence={<RichText pieces={sentence(preview)} />}
        lead={recipe?.library}
      >
        <SourceFacts source={preview} />
        {preview.submodules.length > 0 && (
          <p className="mt-3 text-note text-ink-3">
            Submodules are not fetched and are empty folders in the build: {preview.submodules.join(', ')}.
          </p>
        )}
        {canRegister && (
          <form onSubmit={handleSubmit} className="no-print mt-4 grid max-w-[44em] gap-3">
            <Field
              label="What it is, in a few words"
              value={label}
              placeholder={preview.label}
              maxLength={120}
              onChange={(event) => setLabel(event.target.value)}
            />
            <ProblemLines error={register.error} />
            <div className="flex flex-wrap items-center gap-x-5.5 gap-y-2">
              <Button type="submit" isMain disabled={register.isPending}>
                {recipe.prepare.length === 0 ? 'Register it' : 'Register and prepare it'}
              </Button>
              <TextAction onClick={onAnother}>Another source</TextAction>
            </div>
          </form>
        )}
        {!canRegister && (
          <div className="no-print mt-4 flex flex-wrap items-center gap-x-5.5 gap-y-2">
            {existing !== null && (
              <ButtonLink isMain to={paths.build(existing.id)}>
                {`Open the build: ${existing.label}`}
              </ButtonLink>
            )}
            <TextAction onClick={onAnother}>Another source</TextAction>
          </div>
        )}
      </VerdictBlock>
      {recipe === null && (
        <Entry title="Problems" note="In tallyroot.yaml, line by line.">
          <StateNote
            isProblem
            title="The manifest cannot be used"
            actions={<ButtonLink to={paths.guideChapter('manifest')}>How a manifest is written</ButtonLink>}
          >
            <IssueList issues={preview.issues} />
          </StateNote>
        </Entry>
      )}
      {recipe !== null && (
        <>
          <Entry title="Solvers" note="As the manifest declares them.">
            <DeclaredSolvers solvers={recipe.solvers} />
          </Entry>
          <Entry title="Recipe" note="What will be run, and how.">
            <RecipeList recipe={recipe} folder={null} />
          </Entry>
        </>
      )}
    </>
  );
}
