/** Progress on a terminal's standard error; silent where that is no terminal. */
export interface ProgressBar {
  advance(label: string): void;
  finish(): void;
}

const width = 32;

export function createProgressBar(total: number, stream: NodeJS.WriteStream = process.stderr): ProgressBar {
  let done = 0;
  let drawnAt = 0;
  const draw = (label: string): void => {
    const filled = total === 0 ? width : Math.round((done / total) * width);
    const bar = '|'.repeat(filled) + '·'.repeat(width - filled);
    stream.write(`\r\u001b[2K${bar} ${done} of ${total}  ${label.slice(0, 60)}`);
  };
  return {
    advance(label) {
      done += 1;
      if (!stream.isTTY) return;
      const now = performance.now();
      if (now - drawnAt < 60 && done < total) return;
      drawnAt = now;
      draw(label);
    },
    finish() {
      if (stream.isTTY) stream.write('\r\u001b[2K');
    },
  };
}
