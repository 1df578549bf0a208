import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { WireEvent } from '../../../server/runner/wire.ts';
import { encodeAnswer, encodeHead, encodePairAnswer, parseLine } from '../../../server/runner/wire.ts';
import { LineReader } from '../../../server/runner/wire-lines.ts';
import { parseNumber } from '../../../server/runner/wire-numbers.ts';

const SEED = 20_240_611;

function parse(line: string | Uint8Array): WireEvent {
  const bytes = Buffer.from(line);
  return parseLine(bytes, 0, bytes.length);
}

function reasonOf(line: string | Uint8Array): string {
  const event = parse(line);
  return event.kind === 'garbled' ? event.reason : `not garbled: ${event.kind}`;
}

function readAll(chunks: Uint8Array[]): WireEvent[] {
  const reader = new LineReader();
  const events: WireEvent[] = [];
  for (const chunk of chunks) {
    let at = 0;
    while (at < chunk.length) {
      at += reader.push(chunk.subarray(at));
      for (let event = reader.next(); event; event = reader.next()) events.push(event);
    }
  }
  return events;
}

describe('parseNumber', () => {
  it.each([
    ['1', 1],
    ['+1.', 1],
    ['-.5', -0.5],
    ['1.e2', 100],
    ['007', 7],
    ['1E-3', 0.001],
    ['-0', -0],
    ['1e400', Number.POSITIVE_INFINITY],
    ['-1e-400', -0],
    ['0e99999999999', 0],
    ['inf', Number.POSITIVE_INFINITY],
    ['-INF', Number.NEGATIVE_INFINITY],
    ['+Infinity', Number.POSITIVE_INFINITY],
    ['nan', Number.NaN],
    ['-NaN', Number.NaN],
    ['nan(0x7ff)', Number.NaN],
  ])('reads %s', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  // Values by hand from the definition: mantissa · 2^exponent, ties to even.
  it.each([
    ['0x1p0', 1],
    ['0X1.8P+1', 3],
    ['-0x.8', -0.5],
    ['0x10', 16],
    ['0x1.', 1],
    ['0x1.921fb54442d18p+1', Math.PI],
    ['0x1p-1074', Number.MIN_VALUE],
    ['0x1p-1075', 0],
    ['0x1.0000001p-1075', Number.MIN_VALUE],
    ['0x1.8p-1074', 2 * Number.MIN_VALUE],
    ['0x1.fffffffffffffp1023', Number.MAX_VALUE],
    ['0x1.fffffffffffff7p1023', Number.MAX_VALUE],
    ['0x1.fffffffffffff8p1023', Number.POSITIVE_INFINITY],
    ['0x20000000000001', 2 ** 53],
    ['0x20000000000003', 2 ** 53 + 4],
    [`0x20000000000001${'0'.repeat(60)}1p-244`, 2 ** 53 + 2],
    ['0x0p99999999999999', 0],
    ['-0x0', -0],
    ['0x1p99999999999999', Number.POSITIVE_INFINITY],
    [`0x1${'0'.repeat(1000)}p-4000`, 1],
    [`0x.${'0'.repeat(1000)}1p4004`, 1],
  ])('reads the hexadecimal %s rounded once, half to even', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  it.each([
    '',
    '+',
    '.',
    'e5',
    '1d5',
    '1D-3',
    '1,5',
    "1'000",
    '1_000',
    '1 000',
    '0x',
    '0x.p1',
    '0xp1',
    '0b1',
    '1e',
    '1e+',
    '--1',
    'infin',
    'nanx',
    'in',
    '1.2.3',
    '1f',
    'Inf1',
    '１',
  ])('does not take "%s" for a number', (text) => {
    expect(parseNumber(text)).toBeNull();
  });

  it('reads back the shortest decimal of every binary64 to the same bits', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: false }), (x) =>
        Object.is(parseNumber(encodeAnswer(x).slice(2, -1)), x),
      ),
      { seed: SEED, numRuns: 2000 },
    );
  });

  it('reads the exact hexadecimal of every finite binary64 to the same bits', () => {
    const view = new DataView(new ArrayBuffer(8));
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => {
        view.setFloat64(0, x);
        const bits = view.getBigUint64(0);
        const field = Number((bits >> 52n) & 0x7ffn);
        const fraction = (bits & 0xfffffffffffffn).toString(16).padStart(13, '0');
        const sign = bits >> 63n === 1n ? '-' : '';
        const text = `${sign}0x${field === 0 ? 0 : 1}.${fraction}p${field === 0 ? -1022 : field - 1023}`;
        return Object.is(parseNumber(text), x);
      }),
      { seed: SEED, numRuns: 2000 },
    );
  });

  it('takes linear time on a line of a million digits that is none', () => {
    expect(parseNumber(`${'1'.repeat(1_000_000)}x`)).toBeNull();
    expect(parseNumber(`0x${'1'.repeat(1_000_000)}y`)).toBeNull();
    expect(parseNumber(`1.${'3'.repeat(1_000_000)}`)).toBe(4 / 3);
  });
});

describe('parseLine', () => {
  it('reads asks, with any blanks around the fields and a CR before the line feed', () => {
    expect(parse('f 1.5')).toEqual({ kind: 'ask', what: 'f', x: 1.5, more: null });
    expect(parse(' \tdf\t -2e3 \r')).toEqual({ kind: 'ask', what: 'df', x: -2000, more: null });
    expect(parse('d2f 0x1p-1')).toEqual({ kind: 'ask', what: 'd2f', x: 0.5, more: null });
    expect(parse('fdf inf')).toEqual({ kind: 'ask', what: 'fdf', x: Number.POSITIVE_INFINITY, more: null });
    expect(parse('jac 1 2 3')).toEqual({ kind: 'ask', what: 'jac', x: 1, more: [2, 3] });
    expect(parse('f nan')).toEqual({ kind: 'ask', what: 'f', x: Number.NaN, more: null });
  });

  it('keeps the sign of zero', () => {
    expect(parse('f -0')).toEqual({ kind: 'ask', what: 'f', x: -0, more: null });
    expect(parse('f -0.0e5')).toEqual({ kind: 'ask', what: 'f', x: -0, more: null });
  });

  it('reads steps, iterations, end lines and ready', () => {
    expect(parse('step 1')).toEqual({ kind: 'step', x: 1, more: null });
    expect(parse('step 1 0 2')).toEqual({ kind: 'step', x: 1, more: [0, 2] });
    expect(parse('iterations -7')).toEqual({ kind: 'iterations', count: -7 });
    expect(parse('root 7 1.25')).toEqual({ kind: 'root', id: 7, x: 1.25, more: null });
    expect(parse('fail 7')).toEqual({ kind: 'fail', id: 7, text: '' });
    expect(parse('fail 7   no change of sign  ')).toEqual({ kind: 'fail', id: 7, text: 'no change of sign' });
    expect(parse('ready 1')).toEqual({ kind: 'ready', version: '1', text: '' });
    expect(parse('ready\t1  a library 2.1')).toEqual({ kind: 'ready', version: '1', text: 'a library 2.1' });
  });

  it('takes blank lines and lines beginning with # for comments', () => {
    for (const line of ['', '\r', '  \t ', '# f 1', '  #', '#é'])
      expect(parse(line)).toEqual({ kind: 'comment' });
  });

  it('says what is wrong with a line', () => {
    expect(reasonOf('hello')).toBe('an unknown verb "hello"');
    expect(reasonOf('F 1')).toBe('an unknown verb "F"');
    expect(reasonOf('f')).toBe('f needs a number');
    expect(reasonOf('f 1,5')).toBe('"1,5" is no number');
    expect(reasonOf('step 1D0')).toBe('"1D0" is no number');
    expect(reasonOf('iterations 2.0')).toBe('iterations takes an integer');
    expect(reasonOf('iterations')).toBe('iterations takes one number, this line has 0');
    expect(reasonOf('iterations 1 2')).toBe('iterations takes one number, this line has 2');
    expect(reasonOf('root 1')).toBe('root needs a number');
    expect(reasonOf('root x 1')).toBe('root takes the number of the solve first');
    expect(reasonOf('fail')).toBe('fail takes the number of the solve first');
    expect(reasonOf(`f${' 1'.repeat(201)}`)).toBe('more than 200 numbers');
  });

  it('does not take a NUL, a form feed or bytes that are no UTF-8, wherever they stand', () => {
    expect(reasonOf('f 1\0')).toBe('a NUL byte');
    expect(reasonOf('f\f1')).toBe('a form feed');
    expect(reasonOf(Uint8Array.of(0x23, 0x20, 0xe9))).toBe('bytes that are no UTF-8');
  });

  it('keeps the first 200 characters of a garbled line, escaped', () => {
    expect(parse('say \u001b[31m\u2028')).toMatchObject({ line: 'say \\x1b[31m\\u{2028}' });
    expect(parse(Uint8Array.of(0x66, 0xff, 0x00))).toMatchObject({ line: 'f\\xff\\x00' });
    expect(parse(`😀${'é'.repeat(500)}`)).toMatchObject({ line: `😀${'é'.repeat(199)}` });
  });

  it('keeps the first 200 characters of a fail text', () => {
    expect(parse(`fail 1 ${'ä'.repeat(300)}`)).toEqual({ kind: 'fail', id: 1, text: 'ä'.repeat(200) });
  });

  it('gives a defined event for any bytes, and never throws', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 80 }), (bytes) => typeof parse(bytes).kind === 'string'),
      { seed: SEED, numRuns: 5000 },
    );
  });

  it('reads a plain ask as it reads the same ask by the careful way', () => {
    const number = fc.stringMatching(/^[-+]?[0-9.]{0,5}([eE][-+]?[0-9]{0,3})?[x \r]?$/);
    fc.assert(
      fc.property(number, (text) => {
        expect(parse(`f ${text}`)).toEqual(withLine(parse(`  f ${text}`), `f ${text}`));
      }),
      { seed: SEED, numRuns: 5000 },
    );
  });
});

function withLine(event: WireEvent, text: string): WireEvent {
  return event.kind === 'garbled' ? { ...event, line: text.replace('\r', '\\x0d') } : event;
}

describe('LineReader', () => {
  const valid = [
    'ready 1 x',
    'f 1.5',
    'df -2e-3',
    'fdf 1',
    'step 1 0 2',
    '# note',
    'iterations 3',
    'root 1 1.5',
    'fail 1 no',
  ];

  it('gives the same events however the bytes are cut into chunks', () => {
    const line = fc.oneof(fc.constantFrom(...valid), fc.string({ maxLength: 20 }));
    fc.assert(
      fc.property(
        fc.array(line, { maxLength: 12 }),
        fc.array(fc.integer({ min: 1, max: 9 })),
        (lines, cuts) => {
          const bytes = Buffer.from(lines.map((text) => `${text}\n`).join(''));
          const chunks: Uint8Array[] = [];
          let at = 0;
          for (const cut of cuts) {
            chunks.push(bytes.subarray(at, at + cut));
            at += cut;
          }
          chunks.push(bytes.subarray(at));
          expect(readAll(chunks)).toEqual(readAll([bytes]));
        },
      ),
      { seed: SEED, numRuns: 500 },
    );
  });

  it('gives one event a line for valid lines with bytes changed, put in or left out', () => {
    const edit = fc.tuple(fc.nat(200), fc.nat(255), fc.constantFrom('change', 'insert', 'delete'));
    fc.assert(
      fc.property(
        fc.array(fc.constantFrom(...valid), { minLength: 1, maxLength: 8 }),
        fc.array(edit),
        (lines, edits) => {
          const bytes = [...Buffer.from(lines.map((text) => `${text}\n`).join(''))];
          for (const [at, byte, how] of edits) {
            const place = at % (bytes.length + 1);
            bytes.splice(place, how === 'insert' ? 0 : 1, ...(how === 'delete' ? [] : [byte]));
          }
          const count = bytes.filter((byte) => byte === 0x0a).length;
          expect(readAll([Uint8Array.from(bytes)])).toHaveLength(count);
        },
      ),
      { seed: SEED, numRuns: 2000 },
    );
  });

  it('takes a last line without its line feed for no line', () => {
    expect(readAll([Buffer.from('f 1\nf 2')])).toEqual([{ kind: 'ask', what: 'f', x: 1, more: null }]);
  });

  it('reads a line of exactly 1 MiB and calls a longer one garbled, once', () => {
    const longest = `f ${'0'.repeat(1024 * 1024 - 3)}1`;
    expect(longest).toHaveLength(1024 * 1024);
    expect(readAll([Buffer.from(`${longest}\nf 2\n`)]).map((event) => event.kind)).toEqual(['ask', 'ask']);
    const events = readAll([Buffer.from(`f 0${'1'.repeat(5 * 1024 * 1024)}\nf 2\n`)]);
    expect(events).toMatchObject([
      { kind: 'garbled', reason: 'a line over 1 MiB' },
      { kind: 'ask', x: 2 },
    ]);
    const barely = readAll([Buffer.from(`${longest}1\nf 2\n`)]);
    expect(barely).toMatchObject([
      { kind: 'garbled', reason: 'a line over 1 MiB' },
      { kind: 'ask', x: 2 },
    ]);
  });
});

describe('encodeHead', () => {
  it('writes the lines of a problem in the order of the wire', () => {
    const solver = {
      name: 'secant',
      uses: ['f' as const, 'df' as const],
      tolerance: { xabs: 0, xrel: 1e-15, fabs: 0 },
      settings: { 'max-steps': 200, mode: 'fast' },
    };
    expect(encodeHead({ id: 7, solver, bracket: [-0, 1e21], starts: [1, 0.1], allow: 200 })).toBe(
      'solve 7 secant\nbracket -0 1e+21\nstart 1 0.1\noffers f df\ntolerance 0 1e-15 0\nset max-steps 200\nset mode fast\nallow 200\n',
    );
    expect(
      encodeHead({ id: 8, solver: { ...solver, settings: {} }, bracket: null, starts: [], allow: 5 }),
    ).toBe('solve 8 secant\noffers f df\ntolerance 0 1e-15 0\nallow 5\n');
  });

  it('writes answers as the shortest decimals, with the words for what is not finite', () => {
    expect(encodeAnswer(-0)).toBe('= -0\n');
    expect(encodeAnswer(Number.NaN)).toBe('= nan\n');
    expect(encodePairAnswer(Number.NEGATIVE_INFINITY, 0.1)).toBe('= -inf 0.1\n');
  });
});
