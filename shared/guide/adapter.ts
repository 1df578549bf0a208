import { type Chapter, code, list, paragraph, steps, table } from './section.ts';

export const adapterChapter: Chapter = {
  id: 'adapter',
  title: 'Writing an adapter',
  summary: 'How your solvers are connected to Tallyroot: with a kit in minutes, or from scratch in an hour.',
  sections: [
    {
      id: 'what',
      title: 'What an adapter is',
      blocks: [
        paragraph(
          'An adapter is a small program in the repository of your library. Tallyroot starts it, names a solver and a problem, and from then on the adapter asks: `f 1.5` is a question, `= 0.25` the answer. When the solver is done the adapter says `root` or `fail`. It never sees the equation, only numbers, so a count cannot be wrong and every x that was asked for is on record to the last bit.',
        ),
        paragraph(
          'An adapter does no more than your own callers do: it gives your routine a function, a bracket or starts, and a tolerance. Do not tune it to a suite, do not store values that the library does not store, and report a failure as a failure: an honest refusal is never worse than a false claim.',
        ),
      ],
    },
    {
      id: 'kit',
      title: 'With the kit for Node.js',
      blocks: [
        steps(
          'Copy `adapter.mjs` from the kit into the repository, for example to `tally/adapter.mjs`. It has no dependencies.',
          'Write a file beside it that gives one function for each solver.',
          'Write `tallyroot.yaml` at the root of the repository.',
          'Run `tallyroot measure` on the folder, or register a build.',
        ),
        code('javascript', kitExample()),
        table(
          'What a function of the kit is given',
          ['argument', 'meaning'],
          [
            ['`f(x)`, `df(x)`, `d2f(x)`', 'value and derivatives; only those under `uses` in the manifest'],
            ['`inputs.bracket`', 'two numbers, or null'],
            ['`inputs.starts`', 'as many numbers as the manifest says'],
            ['`inputs.settings`', 'names and values from the manifest'],
            ['`inputs.allow`', 'the evaluations allowed'],
            ['`tolerance`', '`xabs`, `xrel` and `fabs`; 0 means not asked'],
            ['`tools.fdf(x)`', 'f and f′ at once, counted as two evaluations'],
            ['`tools.step(x, low, high)`', 'reports a new approximation; the bracket may be left out'],
            ['`tools.iterations(k)`', 'reports what the library says it took'],
          ],
        ),
        paragraph(
          'A number given back claims a root. `{ fail: "no change of sign" }`, or an error thrown, says that there was no convergence. When the evaluations are used up the call of `f` throws `Stopped`: let it through.',
        ),
      ],
    },
    {
      id: 'scratch',
      title: 'From scratch, in any language',
      blocks: [
        paragraph(
          'Reading and writing lines is all that is needed. This one is complete; its solver is the secant method, and in its place stands a call of your library.',
        ),
        code('python', scratchExample()),
        list(
          'Flush after `ready`, after every question and after every end line. Most adapters that hang have not.',
          'Read one line at a time and never beyond it: Tallyroot writes nothing more until it has read yours.',
          'Standard output belongs to the wire. If the library prints, send what it prints to standard error.',
          'Write numbers so that they read back to the same bits: 17 significant digits, or the shortest that do.',
          'Skip head lines that you do not know; later versions may add some.',
          'Map the tolerance to the nearest that the library accepts and that is not looser.',
        ),
      ],
    },
    {
      id: 'by-hand',
      title: 'Trying it by hand',
      blocks: [
        paragraph(
          'Start the adapter in a terminal and type what Tallyroot would. It asks `f 1`; answer `= -1`, and so on.',
        ),
        code(
          'wire',
          `
> open 1
ready 1 my roots 1.0
> solve 1 secant
> start 1 2
> offers f
> tolerance 0 1e-15 0
> allow 200
> go
f 1
> = -1
f 2
> = 2`,
        ),
      ],
    },
  ],
  see: ['wire', 'manifest'],
};

function kitExample(): string {
  return `
import { serve } from './adapter.mjs';

function secant(f, x0, x1, tolerance, onStep) {
  let [a, b] = [x0, x1];
  let [fa, fb] = [f(a), f(b)];
  for (let step = 0; step < 100; step += 1) {
    if (fb === 0) return b;
    if (fa === fb) return null;
    const next = b - (fb * (b - a)) / (fb - fa);
    onStep(next);
    if (Math.abs(next - b) <= tolerance * Math.abs(next)) return next;
    [a, fa] = [b, fb];
    [b, fb] = [next, f(next)];
  }
  return null;
}

serve({
  name: 'my roots 1.0',
  solvers: {
    secant: (f, df, d2f, inputs, tolerance, tools) => {
      const [x0, x1] = inputs.starts;
      const relative = Math.max(tolerance.xrel, Number.EPSILON);
      return secant(f, x0, x1, relative, tools.step) ?? { fail: 'no convergence' };
    },
  },
});`;
}

function scratchExample(): string {
  return `
import sys


class Stopped(Exception):
    pass


def read():
    line = sys.stdin.readline()
    if line in ("", "close\\n"):
        sys.exit(0)
    return line.split()


def write(*fields):
    print(*fields, flush=True)


def f(x):
    write("f", repr(x))
    answer = read()
    if answer[0] == "stop":
        raise Stopped
    return float(answer[1])


def secant(a, b):
    fa, fb = f(a), f(b)
    for _ in range(100):
        if fb == 0:
            return b
        if fa == fb:
            return None
        x = b - fb * (b - a) / (fb - fa)
        write("step", repr(x))
        if abs(x - b) <= 2.3e-16 * abs(x):
            return x
        a, fa, b, fb = b, fb, x, f(x)
    return None


read()
write("ready 1 my roots 1.0")
while True:
    _, number, solver = read()
    head = {}
    while True:
        verb, *fields = read()
        if verb == "go":
            break
        head[verb] = fields
    try:
        a, b = (float(field) for field in head["start"])
        x = secant(a, b)
        if x is None:
            write("fail", number, "no convergence")
        else:
            write("root", number, repr(x))
    except Stopped:
        write("fail", number, "the budget is used up")`;
}
