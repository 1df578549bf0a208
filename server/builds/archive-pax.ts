/**
 * The records of a pax extended header, each `LENGTH KEY=VALUE\n` with the length of the whole record
 * (IEEE Std 1003.1-2017, pax, "pax Extended Header"). Null where one is malformed.
 */
export function readPax(bytes: Buffer): Map<string, Buffer> | null {
  const fields = new Map<string, Buffer>();
  let at = 0;
  while (at < bytes.length) {
    const blank = bytes.indexOf(0x20, at);
    const digits = blank < 0 ? '' : bytes.toString('latin1', at, blank);
    if (!/^[1-9]\d{0,5}$/.test(digits)) return null;
    const end = at + Number(digits);
    const equals = bytes.indexOf(0x3d, blank);
    if (end > bytes.length || bytes[end - 1] !== 0x0a || equals < 0 || equals >= end) return null;
    const key = bytes.toString('utf8', blank + 1, equals);
    // A key given twice is read differently by different programs.
    if (key === '' || fields.has(key)) return null;
    fields.set(key, bytes.subarray(equals + 1, end - 1));
    at = end;
  }
  return fields;
}
