/** What stands at the foot of every report and page. */
export const careSentence =
  'Results say how a build behaved on the listed equations on one machine. They are no proof of correctness and no licence to use a solver where people can be hurt; there, the codes and the licensed practice of the place decide.';
