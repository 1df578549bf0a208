import { type OrderStatus, orderStatuses } from '../schemas/solve.ts';
import { type Chapter, list, paragraph, table } from './section.ts';

export const orderMeanings: Record<OrderStatus, string> = {
  estimated: 'The order lies in the interval shown.',
  linear: 'Order 1: the error falls by about the same factor at every step; the factor is shown.',
  'one ratio':
    'The estimate rests on a single ratio. It is shown for one-point methods only, since it misleads for others.',
  'superlinear of order 1':
    'Faster than linear, but not by a power: the factor itself falls from step to step.',
  'sublinear or very slow linear': 'The error falls by less than 2 % a step.',
  'superlinear, order not resolved':
    'Faster than linear; the run is too short or too uneven to say by which order.',
  undecided: 'Linear or superlinear: this run does not tell.',
  'not enough steps':
    'Too few errors stand above rounding. A normal answer: fast methods reach 16 digits in few steps.',
  stagnation: 'Eight steps or more that gained less than a factor 2 in all.',
  'stopped moving': 'The iterates stand still at an x that is no root.',
  cycle: 'The iterates come back to where they were; the length of the cycle is shown.',
  diverged: 'The iterates run away.',
  'left the domain': 'An iterate is inf or nan.',
  'no root to measure against': 'The case has no certified root, so that there are no errors.',
};

export const orderChapter: Chapter = {
  id: 'order',
  title: 'Order of convergence',
  summary: 'How the order is estimated from one run, and when nothing can be said.',
  sections: [
    {
      id: 'estimate',
      title: 'The estimate',
      blocks: [
        paragraph(
          'The order p is the power in |e(k+1)| ≈ C |e(k)|^p, with e the error of an iterate against the certified root. The gain of a step is how far the logarithm of the error falls; the ratio of one gain to the gain before tends to p. Only errors above 16 times the attainable accuracy are used: closer to the root every formula measures rounding.',
        ),
        list(
          'Linear convergence is told first, by gains that do not grow.',
          'Two ratios that agree give an order as for Newton’s method (kind Q).',
          'Methods with memory, such as the secant method, have ratios that swing about the order; they are averaged (kind memory).',
          'Runs that are not monotone are judged by their envelope (kind R).',
        ),
      ],
    },
    {
      id: 'statuses',
      title: 'What is said about a run',
      blocks: [
        table(
          'Statuses of the estimate',
          ['status', 'meaning'],
          orderStatuses.map((status) => [status, orderMeanings[status]]),
        ),
      ],
    },
    {
      id: 'expect',
      title: 'What to expect',
      blocks: [
        table(
          'Orders on a simple root, common knowledge of the field',
          ['method', 'order'],
          [
            ['bisection', '1, with a factor 1/2'],
            ['secant', '1.618'],
            ['Newton', '2'],
            ['Halley', '3'],
          ],
        ),
        paragraph(
          'At a multiple root these methods fall back to order 1 in every build. An order that changed is judged by its interval alone, never by the value in its middle. A run from another start can have another interval, so claims are best held against many starts.',
        ),
      ],
    },
  ],
  see: ['accuracy', 'changes', 'allowances'],
};
