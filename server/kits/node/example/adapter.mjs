import { serve } from '../adapter.mjs';
import { secant } from './secant.mjs';

serve({
  name: 'example-roots 1.0',
  solvers: {
    secant: (f, _df, _d2f, inputs, tolerance, tools) => {
      const [x0, x1] = inputs.starts;
      // The nearest that this library accepts and that is not looser than what is asked.
      const relative = Math.max(tolerance.xrel, Number.EPSILON);
      let steps = 0;
      const root = secant(f, x0, x1, {
        relative,
        maxSteps: inputs.settings['max-steps'] ?? 100,
        onStep: (x) => {
          steps += 1;
          tools.step(x);
        },
      });
      tools.iterations(steps);
      return root ?? { fail: 'no convergence' };
    },
  },
});
