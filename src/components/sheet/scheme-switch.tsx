import { useState } from 'react';
import { keepScheme, readScheme, type Scheme, schemes } from '../../lib/scheme.ts';

const words: Record<Scheme, string> = { light: 'light', dark: 'dark', system: 'system' };

/** Light, dark, or as the system says; kept in this browser. */
export function SchemeSwitch() {
  const [scheme, setScheme] = useState(readScheme);
  return (
    <label className="inline-flex items-center">
      <span className="sr-only">Colours of the sheet</span>
      <select
        value={scheme}
        onChange={(event) => {
          const next = schemes.find((candidate) => candidate === event.target.value) ?? 'system';
          keepScheme(next);
          setScheme(next);
        }}
        className="min-h-6 rounded-focus bg-paper text-table text-ink-2"
      >
        {schemes.map((name) => (
          <option key={name} value={name}>
            {words[name]}
          </option>
        ))}
      </select>
    </label>
  );
}
