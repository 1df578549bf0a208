import { stripScale, stripWidth } from './digit-strip.tsx';

export interface StripHeaderProps {
  pitch?: 10 | 8 | 7;
}

/** The scale of a column of strips, once, at the same x: with it the table is a chart. */
export function StripHeader({ pitch = 10 }: StripHeaderProps) {
  const scale = stripScale(pitch);
  const width = stripWidth(pitch);
  return (
    <svg className="draw" width={width} height={14} viewBox={`0 0 ${width} 14`} aria-hidden="true">
      {[0, 4, 8, 12, 16].map((digits) => (
        <text key={digits} className="draw-small" x={scale.x0 + digits * pitch} y={10} textAnchor="middle">
          {digits}
        </text>
      ))}
    </svg>
  );
}
