import { type Chapter, code, list, paragraph, table } from './section.ts';

export const wireChapter: Chapter = {
  id: 'wire',
  title: 'The wire, version 1',
  summary: 'Every line that Tallyroot and an adapter exchange, what counts, and what becomes of mistakes.',
  sections: [
    {
      id: 'transport',
      title: 'Lines',
      blocks: [
        paragraph(
          'The adapter is started in the folder of the build and serves many solves, one at a time. Standard input carries the lines from Tallyroot, standard output those to it; standard error is kept as a log, its last 64 KiB for each start. A line is UTF-8, ends in LF (CR LF is accepted) and is at most 1 MiB long. Fields are separated by blanks or tabs. Blank lines and lines that begin with `#` are comments. The end of the input means `close`.',
        ),
        paragraph(
          'Flush standard output after `ready`, after every line that waits for an answer and after every end line. Numbers are decimals with any count of digits, hexadecimal floats, `inf` or `nan`; they are read as the nearest binary64. Exponents with D, decimal commas and groups of digits are not accepted. Tallyroot writes the shortest decimal that reads back to the same bits, keeps the sign of zero, and never writes hexadecimal.',
        ),
      ],
    },
    {
      id: 'from-tallyroot',
      title: 'What Tallyroot writes',
      blocks: [
        table(
          'Lines from Tallyroot',
          ['line', 'meaning'],
          [
            ['`open 1`', 'the version of the wire; the first line'],
            ['`solve ID SOLVER`', 'begins the head of a problem; ID is a positive integer'],
            ['`bracket A B`', 'for solvers that take a bracket'],
            ['`start X0 X1 …`', 'for solvers that take starts, all on one line'],
            ['`point N X1 … XN`', 'for systems: the starting point, N at most 200'],
            [
              '`offers f df d2f jac`',
              'the evaluations that may be asked for, as the manifest says under `uses`',
            ],
            ['`tolerance XABS XREL FABS`', 'what is asked of the answer; 0 means not asked'],
            ['`set NAME VALUE`', 'a setting from the manifest'],
            ['`allow N`', 'at most N evaluations'],
            [
              '`digits N`',
              'decimal arithmetic with N digits on both sides; only where the manifest says `digits: true`',
            ],
            ['`go`', 'the solver starts; nothing may be asked before it'],
            ['`= Y`, `= Y DY`, `= F1 … FN`', 'the answer to a question; a Jacobian is given by rows'],
            ['`stop`', 'in place of an answer: the evaluations are used up, and nothing more is answered'],
            ['`close`', 'no more work; the adapter exits with status 0'],
          ],
        ),
      ],
    },
    {
      id: 'not-sent',
      title: 'What is not sent yet',
      blocks: [
        paragraph(
          'Suites hold single equations, answered in binary64. `point` and `digits` belong to this version of the wire but are not sent: a solver that takes a point, or uses a Jacobian, is not applicable to any case.',
        ),
      ],
    },
    {
      id: 'from-adapter',
      title: 'What an adapter writes',
      blocks: [
        table(
          'Lines from the adapter',
          ['line', 'answer', 'meaning'],
          [
            [
              '`ready 1 TEXT`',
              'none',
              'its version of the wire, and a free text such as the version of the library',
            ],
            ['`f X`', '`= Y`', 'asks for f; in systems `f X1 … XN`'],
            ['`df X`, `d2f X`', '`= Y`', 'asks for the first or second derivative'],
            [
              '`fdf X`',
              '`= Y DY`',
              'asks for f and f′; counts as one of each, and is not answered where only one is left',
            ],
            ['`jac X1 … XN`', '`= J11 J12 … JNN`', 'asks for the Jacobian of a system'],
            [
              '`step X`, `step X LO HI`',
              'none',
              'a new approximation, already computed, and the bracket now held',
            ],
            ['`iterations K`', 'none', 'what the library says it took; before the end line'],
            ['`root ID X`', 'none', 'ends the solve: claims convergence at X'],
            [
              '`fail ID TEXT`',
              'none',
              'ends the solve: says that it did not converge; 200 characters of the text are kept',
            ],
          ],
        ),
        paragraph(
          'Between its end line and the next `go` an adapter writes nothing but comments, and does not exit. If it does, the solve that had ended keeps its result with a remark, and the next one starts with a fresh adapter.',
        ),
      ],
    },
    {
      id: 'exchange',
      title: 'A whole exchange',
      blocks: [
        paragraph('Lines from Tallyroot are marked with `>`, which is not written on the wire.'),
        code(
          'wire',
          `
> open 1
ready 1 my roots 1.0
> solve 7 newton
> start 1
> offers f df
> tolerance 0 1e-15 0
> allow 200
> go
fdf 1
> = -1 2
step 1.5
fdf 1.5
> = 0.25 3
step 1.4166666666666667
f 1.4166666666666667
> = 0.006944444444444642
iterations 2
fail 7 too many steps
> close`,
        ),
      ],
    },
    {
      id: 'counts',
      title: 'What counts',
      blocks: [
        list(
          'Evaluations are f, f′ and f″ together; each is counted on its own as well. A system’s f counts one, and so does its Jacobian, which is shown also as N.',
          'Iterations are what the adapter reports, else the number of `step` lines, else unknown. They are never guessed, and never make a change by themselves. A negative number, or one above the evaluations plus one, is shown as not credible.',
          'A question outside the domain of f, at inf or at nan is answered, with `nan` where the equation gives nothing, and is marked in the path.',
          'Neither a step nor a comment costs anything.',
        ),
      ],
    },
    {
      id: 'time',
      title: 'Time',
      blocks: [
        table(
          'Limits of time and of lines',
          ['from', 'to', 'limit'],
          [
            ['start', '`ready`', '20 s'],
            ['`go`', 'end line', 'what the suite says under `seconds`, 10 s where it says nothing'],
            ['`stop`', 'end line', '2 s of grace'],
            ['`close`', 'exit', '5 s'],
            ['`go`', 'end line', 'besides: at most 10 × allow + 1000 lines that ask for nothing'],
          ],
        ),
        paragraph(
          'The limits are there to end what hangs. How long a solve took is shown and never judged: time is noisy, counts are not.',
        ),
      ],
    },
    {
      id: 'mistakes',
      title: 'What goes wrong, and what it becomes',
      blocks: [
        table(
          'Mistakes on the wire',
          ['what happens', 'outcome', 'then'],
          [
            [
              'an unknown verb, a wrong number of fields, no number where one belongs, an evaluation not offered, an end line with another ID, too many or too long lines',
              'garbled, with the line',
              'the adapter is ended and started afresh for the next solve',
            ],
            ['the process ends during a solve', 'crashed, with its status or signal and the log', 'likewise'],
            ['the time is up', 'timed out', 'likewise'],
            [
              'the evaluations are used up',
              'over budget, whatever is written after `stop`',
              'the adapter goes on if it ends the solve within the grace time',
            ],
            ['`ready` with another version, or another first line', 'none', 'the run stops at once'],
            ['three starts in a row without `ready`', 'none', 'the run stops and keeps its results so far'],
            [
              'ten solves in a row of one solver crashed, timed out or were garbled',
              'the same for the rest of that solver',
              'its other solves are not tried; other solvers go on',
            ],
          ],
        ),
      ],
    },
  ],
  see: ['adapter', 'manifest', 'outcomes'],
};
