import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { CurvePlot } from '../../components/charts/curve-plot.tsx';
import type { SolveSide } from './solve-side.ts';

export interface FunctionPlotProps {
  suiteCase: SuiteCase;
  side: SolveSide;
}

/** f over the bracket, the x's asked for on the axis, the chords of the first steps where the method has some. */
export function FunctionPlot({ suiteCase, side }: FunctionPlotProps) {
  const { declaration, root } = side.solve;
  const asked = side.lines
    .filter((line) => line.again === null && (line.event.kind === 'f' || line.event.kind === 'fdf'))
    .map((line) => ({ number: line.number, x: line.event.x, y: line.event.a }));
  const { bracket } = suiteCase;
  return (
    <CurvePlot
      equation={suiteCase.equation}
      parameters={suiteCase.parameters}
      bracket={
        bracket === null || declaration.takes === 'start' ? null : [Number(bracket[0]), Number(bracket[1])]
      }
      roots={root === null ? [] : [root]}
      asked={asked}
      hasChords={declaration.starts === 2 || declaration.takes === 'bracket'}
    />
  );
}
