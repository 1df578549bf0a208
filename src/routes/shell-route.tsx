import { Shell } from '../components/sheet/shell.tsx';
import { useServerEvents } from './use-server-events.ts';

/** The frame of every page, kept fresh by what the server pushes. */
export function ShellRoute() {
  useServerEvents();
  return <Shell />;
}
