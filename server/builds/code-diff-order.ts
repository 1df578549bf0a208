/** What a reader looks for first: the source that a solver runs through. */

const source =
  /\.(?:c|h|cc|cpp|cxx|hpp|hh|inl|f|for|f77|f90|f95|f03|f08|py|pyx|pxd|js|mjs|cjs|ts|mts|jl|m|r|rs|go|java|kt|scala|swift|cs|fs|hs|ml|lua|nim|zig|d|ada|adb|ads|pas|lisp|scm|clj|php|pl|rb|sh)$/i;
const builds =
  /(?:^|\/)(?:makefile|cmakelists\.txt|meson\.build|configure(?:\.ac)?|build\.[a-z]+|pyproject\.toml|cargo\.toml|package\.json|go\.mod|setup\.(?:py|cfg)|tallyroot\.yaml)$|\.(?:cmake|mk|gradle)$/i;
const tests = /(?:^|\/)(?:tests?|spec|examples?|benchmarks?)\/|(?:^|\/)test_[^/]*$|[._]test\.[^/]*$/i;
const generated =
  /(?:^|\/)(?:vendor|third_party|node_modules|dist|build|out|target)\/|\.min\.[a-z]+$|\.lock$|-lock\.[a-z]+$|\.map$/i;
const documents =
  /\.(?:md|rst|txt|adoc|tex|html?|css|svg)$|(?:^|\/)(?:docs?|licen[cs]e|readme|changelog|authors)(?:\/|$)/i;

/** 0 source · 1 what builds it · 2 tests · 3 other · 4 documents · 5 generated. */
export function rankOf(path: string): number {
  if (generated.test(path)) return 5;
  if (builds.test(path)) return 1;
  if (tests.test(path)) return 2;
  if (source.test(path)) return 0;
  return documents.test(path) ? 4 : 3;
}

export function byRank(a: string, b: string): number {
  return rankOf(a) - rankOf(b) || (a < b ? -1 : a > b ? 1 : 0);
}
