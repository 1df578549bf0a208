import { spansOf } from '../../../shared/guide/section.ts';

export interface SpanTextProps {
  text: string;
}

/** A text of the guide: plain, with code set in Mono. */
export function SpanText({ text }: SpanTextProps) {
  return spansOf(text).map((span, index) =>
    span.isCode ? (
      // biome-ignore lint/suspicious/noArrayIndexKey: the spans of one text keep their places
      <code key={index} className="text-figure text-ink">
        {span.text}
      </code>
    ) : (
      span.text
    ),
  );
}
