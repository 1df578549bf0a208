/** Something that can be gone to by typing a part of its name. */
export interface Command {
  /** What it is: page, library, build, suite, case. */
  kind: string;
  name: string;
  /** What else it is known by. */
  about: string;
  to: string;
}

/** How well one word fits, the smaller the better; null where it does not. */
function fitOf(word: string, { kind, name, about }: Command): number | null {
  const text = name.toLowerCase();
  if (text === word) return 0;
  if (text.startsWith(word)) return 1;
  if (text.split(/[^a-z0-9]+/).some((part) => part.startsWith(word))) return 2;
  if (text.includes(word)) return 3;
  if (kind.startsWith(word)) return 4;
  return about.toLowerCase().includes(word) ? 5 : null;
}

/**
 * Commands that have every typed word in their name, kind or description, the best fits first; of equals,
 * the shorter name and then the order given. Nothing typed: all of them, as given.
 */
export function rankCommands(commands: readonly Command[], typed: string): Command[] {
  const words = typed.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return [...commands];
  return commands
    .flatMap((command, index) => {
      let sum = 0;
      for (const word of words) {
        const one = fitOf(word, command);
        if (one === null) return [];
        sum += one;
      }
      return [{ command, sum, index }];
    })
    .sort((a, b) => a.sum - b.sum || a.command.name.length - b.command.name.length || a.index - b.index)
    .map(({ command }) => command);
}
