import { Fragment } from 'react';

/** A sentence in pieces: names in 600, figures in Mono, the rest as running text. */
export interface TextPiece {
  text: string;
  strong?: boolean | undefined;
  figure?: boolean | undefined;
}

export interface RichTextProps {
  pieces: readonly TextPiece[];
}

/** Only the digits of a figure are Mono: `41 of 57` becomes two runs with plain words between. */
function Figure({ text }: { text: string }) {
  const parts = text.split(/(\s*[A-Za-z]{2,}(?:\s+[A-Za-z]{2,})*\s*)/);
  return parts.map((part, index) => {
    if (part === '') return null;
    // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of one sentence keep their places
    return index % 2 === 1 ? <Fragment key={index}>{part}</Fragment> : <Mono key={index} text={part} />;
  });
}

function Mono({ text }: { text: string }) {
  return text.trim() === '' ? text : <span className="num">{text}</span>;
}

function Piece({ piece }: { piece: TextPiece }) {
  const body = piece.figure === true ? <Figure text={piece.text} /> : piece.text;
  return piece.strong === true ? <b>{body}</b> : body;
}

export function RichText({ pieces }: RichTextProps) {
  return pieces.map((piece, index) => (
    // biome-ignore lint/suspicious/noArrayIndexKey: the pieces of one sentence keep their places
    <Piece key={index} piece={piece} />
  ));
}

/** The same sentence without its marks: for titles and text alternatives. */
export function plainText(pieces: readonly TextPiece[]): string {
  return pieces.map((piece) => piece.text).join('');
}
