/** Where the chord through f at a and b meets zero. */
export function chord(f, a, b) {
  const fa = f(a);
  const fb = f(b);
  return cut(a, fa, b, fb);
}

/** The same, from values already in hand. */
export function cut(a, fa, b, fb) {
  return (a * fb - b * fa) / (fb - fa);
}
