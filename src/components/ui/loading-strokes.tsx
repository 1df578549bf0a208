import { useEffect, useState } from 'react';

export interface LoadingStrokesProps {
  /** Said and shown, e.g. "Reading the builds". */
  label: string;
}

const strokes = 20;

/** A row of strokes that turn to ink one after another. With reduced motion the row stands still. */
export function LoadingStrokes({ label }: LoadingStrokesProps) {
  const [drawn, setDrawn] = useState(1);
  useEffect(() => {
    if (window.matchMedia('(prefers-reduced-motion: reduce)').matches) return;
    const timer = window.setInterval(() => setDrawn((count) => Math.min(strokes, count + 1)), 160);
    return () => window.clearInterval(timer);
  }, []);
  return (
    <div role="status" className="border-t border-rule-strong pb-4 pt-3">
      <p className="text-body font-medium">{label}</p>
      <svg className="draw mt-1.5" width={strokes * 7 + 24} height={14} aria-hidden="true">
        {Array.from({ length: strokes }, (_, index) => (
          <path
            // biome-ignore lint/suspicious/noArrayIndexKey: strokes are told apart by place alone
            key={index}
            d={`M${2 + index * 7 + Math.floor(index / 5) * 6} 1V13`}
            stroke={index < drawn ? 'var(--ink)' : 'var(--rule-strong)'}
            strokeWidth={1.6}
          />
        ))}
      </svg>
    </div>
  );
}
