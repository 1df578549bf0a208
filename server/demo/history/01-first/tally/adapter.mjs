// Connects the routines of this library to the solver wire.
import { bisection } from '../src/bisection.mjs';
import { illinois } from '../src/illinois.mjs';
import { newton } from '../src/newton.mjs';
import { secant } from '../src/secant.mjs';
import { serve } from './kit.mjs';

/** Runs one routine and turns what it returns into a root or a failure. */
function answer(routine) {
  return (f, df, _d2f, inputs, tolerance, tools) => {
    const most = inputs.settings['max-steps'];
    const end = routine({ f, df, inputs, tolerance, most, step: tools.step });
    tools.iterations(end.steps);
    return end.root === undefined ? { fail: end.failed } : end.root;
  };
}

serve({
  name: 'larkroots 0.1',
  solvers: {
    secant: answer(({ f, inputs, tolerance, most, step }) =>
      secant(f, ...inputs.starts, tolerance, most, step),
    ),
    newton: answer(({ f, df, inputs, tolerance, most, step }) =>
      newton(f, df, inputs.starts[0], tolerance, most, step),
    ),
    bisection: answer(({ f, inputs, tolerance, most, step }) =>
      bisection(f, ...inputs.bracket, tolerance, most, step),
    ),
    illinois: answer(({ f, inputs, tolerance, most, step }) =>
      illinois(f, ...inputs.bracket, tolerance, most, step),
    ),
  },
});
