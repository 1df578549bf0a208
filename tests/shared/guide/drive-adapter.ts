import { spawn } from 'node:child_process';
import { createInterface } from 'node:readline';

/** Plays Tallyroot to an adapter for one solve of `solver`: what it wrote, and its exit status after `close`. */
export async function driveAdapter(
  argv: readonly [string, ...string[]],
  solver: string,
  f: (x: number) => number,
  allow = 200,
): Promise<{ lines: string[]; status: number | null }> {
  const [program, ...args] = argv;
  const child = spawn(program, args, { stdio: ['pipe', 'pipe', 'inherit'] });
  const ended = new Promise<number | null>((resolve, reject) => {
    child.on('error', reject);
    child.on('close', resolve);
  });
  const write = (...lines: string[]) => child.stdin.write(`${lines.join('\n')}\n`);
  const lines: string[] = [];
  let left = allow;
  write('open 1');
  for await (const line of createInterface({ input: child.stdout })) {
    lines.push(line);
    const [verb, x = ''] = line.split(' ');
    if (verb === 'ready') {
      const head = [`solve 5 ${solver}`, 'start 1 2', 'offers f', 'tolerance 0 1e-15 0', `allow ${allow}`];
      write(...head, 'a-line-of-a-later-version 1', 'go');
    } else if (verb === 'f') {
      left -= 1;
      write(left < 0 ? 'stop' : `= ${f(Number(x))}`);
    } else if (verb === 'root' || verb === 'fail') write('close');
  }
  return { lines, status: await ended };
}
