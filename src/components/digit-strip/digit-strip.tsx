import { rowMeasures, StripDrawing } from './strip-drawing.tsx';
import { layOutStrip, mostDigits, rowScale, type StripInput, type StripScale } from './strip-layout.ts';
import { describeStrip, type StripCounts } from './strip-words.ts';

export interface DigitStripProps {
  strip: StripInput;
  counts?: StripCounts | undefined;
  /** The reference is grey, the candidate and what stands alone is ink. */
  isReference?: boolean;
  /** px a digit: 10, or 8 or 7 where five must stand side by side. */
  pitch?: 10 | 8 | 7;
  /** Beside another strip whose label speaks for both. */
  isSilent?: boolean;
}

export const stripHeight = 20;

/** Width of a strip in row size. */
export function stripWidth(pitch: number): number {
  return rowScale.x0 + mostDigits * pitch + 14;
}

export function stripScale(pitch: number): StripScale {
  return { ...rowScale, pitch };
}

/** One solve as a picture: a stroke for each evaluation, at the correct digits that its x has. */
export function DigitStrip({
  strip,
  counts,
  isReference = false,
  pitch = 10,
  isSilent = false,
}: DigitStripProps) {
  const scale = stripScale(pitch);
  const layout = layOutStrip(strip, scale);
  const width = stripWidth(pitch);
  const right = scale.x0 + mostDigits * pitch;
  const { base } = rowMeasures;
  const drawing = (
    <>
      <path
        className="draw-guide"
        d={[0, 4, 8, 12, 16].map((digits) => `M${scale.x0 + digits * pitch} 0V${stripHeight}`).join('')}
      />
      <path className="draw-axis" d={`M${scale.x0 - 0.5} ${base}H${layout.axisEnd}`} />
      {layout.limit !== null && (
        <>
          <path className="draw-beyond" data-part="beyond" d={`M${layout.limit + 3} ${base}H${right}`} />
          <path className="draw-limit" data-part="limit" d={`M${layout.limit} 9v9`} />
        </>
      )}
      <StripDrawing layout={layout} measures={rowMeasures} />
    </>
  );
  const shared = {
    className: `draw ${isReference ? 'text-ref' : 'text-ink'}`,
    width,
    height: stripHeight,
    viewBox: `0 0 ${width} ${stripHeight}`,
  };
  if (isSilent) {
    return (
      <svg {...shared} aria-hidden="true">
        {drawing}
      </svg>
    );
  }
  return (
    <svg {...shared} role="img" aria-label={describeStrip(strip, counts)}>
      {drawing}
    </svg>
  );
}
