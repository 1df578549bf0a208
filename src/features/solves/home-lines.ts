export interface HomeSolve {
  solver: string;
  case: string;
  /** Number of the start from 1, where the case has several. */
  start: number | null;
  suite: string;
  /** Whether the suite comes with the product, so that the command line knows it by name. */
  isBuiltIn: boolean;
  /** A new process for every solve. */
  isFresh: boolean;
}

/** As a shell takes it: quoted where it holds anything but plain characters. */
function word(text: string): string {
  return /^[\w.@+:=/-]+$/.test(text) ? text : `'${text.replaceAll("'", "'\\''")}'`;
}

/** The two commands that repeat a solve and print its path. DIR stands for the folder of the build. */
export function homeLines(solve: HomeSolve): [measure: string, trace: string] {
  const only = `--solver ${word(solve.solver)} --case ${word(solve.case)}`;
  const suite = solve.isBuiltIn ? word(solve.suite) : word(`${solve.suite}.yaml`);
  return [
    `npm run tallyroot -- measure --build DIR --suite ${suite} ${only}${solve.isFresh ? ' --fresh' : ''} --json one.json`,
    `npm run tallyroot -- trace one.json ${only}${solve.start === null ? '' : ` --start ${solve.start}`}`,
  ];
}
