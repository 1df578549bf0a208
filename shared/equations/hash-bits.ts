/**
 * 64-bit FNV-1a hash (Fowler, Noll and Vo; offset basis 14695981039346656037, prime 2^40 + 435; from memory,
 * checked by the published value of one byte in fingerprint.test.ts) in two 32-bit halves, since browsers and
 * servers need the same cheap hash and nothing here is secret.
 */
export class BitHash {
  #high = 0xcbf29ce4;
  #low = 0x84222325;
  readonly #view = new DataView(new ArrayBuffer(8));

  addByte(byte: number): void {
    const mixed = (this.#low ^ byte) >>> 0;
    const product = mixed * 435;
    const carry = Math.floor(product / 2 ** 32);
    // 2^40 times the low half adds its lowest 24 bits, shifted by 8, to the high half.
    this.#high = (this.#high * 435 + carry + ((mixed << 8) >>> 0)) % 2 ** 32;
    this.#low = product % 2 ** 32;
  }

  /** Adds the eight bytes of a binary64 number, highest first; all NaN are one. */
  addNumber(value: number): void {
    this.#view.setFloat64(0, value);
    if (Number.isNaN(value)) this.#view.setUint32(0, 0x7ff80000);
    if (Number.isNaN(value)) this.#view.setUint32(4, 0);
    for (let index = 0; index < 8; index++) this.addByte(this.#view.getUint8(index));
  }

  /** 16 hexadecimal digits. */
  digest(): string {
    return [this.#high, this.#low].map((half) => half.toString(16).padStart(8, '0')).join('');
  }
}
