import { Fragment } from 'react';
import type { DiffHunk, DiffLine } from '../../../shared/schemas/code-diff.ts';
import { linePieces } from './code-files.ts';

export interface CodeLinesProps {
  hunks: readonly DiffHunk[];
}

function LineText({ line }: { line: DiffLine }) {
  return (
    <>
      {linePieces(line).map((piece, index) =>
        piece.isHidden ? (
          // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of a line keep their places
          <b key={index} className="text-worse" title="a character that cannot be seen">
            {piece.text}
          </b>
        ) : (
          piece.text
        ),
      )}
      {line.cut > 0 && <span className="text-ink-3"> … {line.cut} characters more</span>}
      {line.isUnended && <span className="text-ink-3"> (no line end)</span>}
    </>
  );
}

function Line({ line }: { line: DiffLine }) {
  switch (line.kind) {
    case 'was':
      return (
        <div className="code-line">
          <span className="code-number">was</span>
          <del className="code-text text-ink-3 line-through">
            <LineText line={line} />
          </del>
        </div>
      );
    case 'new':
      return (
        <div className="code-line bg-sunk">
          <span className="code-number">{line.number}</span>
          <ins className="code-text border-l-2 border-ink font-medium no-underline">
            <LineText line={line} />
          </ins>
        </div>
      );
    default:
      return (
        <div className="code-line">
          <span className="code-number">{line.number}</span>
          <span className="code-text">
            <LineText line={line} />
          </span>
        </div>
      );
  }
}

/** Lines of one file: removed ones struck through, new ones with a bar of ink. */
export function CodeLines({ hunks }: CodeLinesProps) {
  return (
    <div className="font-mono text-code">
      {hunks.map((hunk, index) => {
        const [first] = hunk.lines;
        return (
          <Fragment key={`${first?.kind ?? ''} ${first?.number ?? index}`}>
            {index > 0 && (
              <div className="code-line text-ink-3">
                <span className="code-number" />
                <span className="code-text">…</span>
              </div>
            )}
            {hunk.lines.map((line) => (
              <Line key={`${line.kind} ${line.number}`} line={line} />
            ))}
          </Fragment>
        );
      })}
    </div>
  );
}
