/** Round constants: the first 32 bits of the fractional parts of the cube roots of the first 64 primes. */
function roundConstants(): { initial: number[]; rounds: number[] } {
  const initial: number[] = [];
  const rounds: number[] = [];
  for (let candidate = 2; rounds.length < 64; candidate += 1) {
    let isPrime = true;
    for (let divisor = 2; divisor * divisor <= candidate; divisor += 1) {
      if (candidate % divisor === 0) isPrime = false;
    }
    if (!isPrime) continue;
    if (initial.length < 8) initial.push(rootBits(candidate, 2n));
    rounds.push(rootBits(candidate, 3n));
  }
  return { initial, rounds };
}

/** First 32 bits after the point of the n-th root of a small integer, by integer bisection (exact). */
function rootBits(value: number, degree: bigint): number {
  const scaled = BigInt(value) << (32n * degree);
  let low = 0n;
  let high = 1n << 40n;
  while (high - low > 1n) {
    const middle = (low + high) >> 1n;
    if (middle ** degree <= scaled) low = middle;
    else high = middle;
  }
  return Number(low & 0xffffffffn);
}

const { initial, rounds } = roundConstants();

function rotate(word: number, by: number): number {
  return (word >>> by) | (word << (32 - by));
}

function padded(bytes: Uint8Array): DataView {
  const blocks = Math.floor((bytes.length + 8) / 64) + 1;
  const buffer = new Uint8Array(blocks * 64);
  buffer.set(bytes);
  buffer[bytes.length] = 0x80;
  const view = new DataView(buffer.buffer);
  view.setUint32(blocks * 64 - 8, Math.floor(bytes.length / 0x20000000));
  view.setUint32(blocks * 64 - 4, (bytes.length << 3) >>> 0);
  return view;
}

function schedule(view: DataView, offset: number): Int32Array {
  const words = new Int32Array(64);
  for (let i = 0; i < 64; i += 1) {
    if (i < 16) {
      words[i] = view.getInt32(offset + 4 * i);
      continue;
    }
    const a = words[i - 15]!;
    const b = words[i - 2]!;
    const s0 = rotate(a, 7) ^ rotate(a, 18) ^ (a >>> 3);
    const s1 = rotate(b, 17) ^ rotate(b, 19) ^ (b >>> 10);
    words[i] = words[i - 16]! + s0 + words[i - 7]! + s1;
  }
  return words;
}

function compress(state: Int32Array, words: Int32Array): void {
  let [a, b, c, d, e, f, g, h] = Array.from(state) as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  for (let i = 0; i < 64; i += 1) {
    const s1 = rotate(e, 6) ^ rotate(e, 11) ^ rotate(e, 25);
    const t1 = (h + s1 + ((e & f) ^ (~e & g)) + rounds[i]! + words[i]!) | 0;
    const s0 = rotate(a, 2) ^ rotate(a, 13) ^ rotate(a, 22);
    const t2 = (s0 + ((a & b) ^ (a & c) ^ (b & c))) | 0;
    [h, g, f, e, d, c, b, a] = [g, f, e, (d + t1) | 0, c, b, a, (t1 + t2) | 0];
  }
  [a, b, c, d, e, f, g, h].forEach((value, i) => {
    state[i] = state[i]! + value;
  });
}

/**
 * SHA-256 of a text in UTF-8, as 64 hexadecimal digits. Pure, so that browser and server agree without their
 * own cryptography; for identifying content, not for secrets. Source: FIPS 180-4, section 6.2.
 */
export function sha256(text: string): string {
  const view = padded(new TextEncoder().encode(text));
  const state = Int32Array.from(initial);
  for (let offset = 0; offset < view.byteLength; offset += 64) compress(state, schedule(view, offset));
  return Array.from(state, (word) => (word >>> 0).toString(16).padStart(8, '0')).join('');
}
