/* An adapter in C. Solvers: `spin` asks until it is stopped; `secant`, `newton` and `bisection` find roots. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

static char line[4096];

static int next_line(void) { return fgets(line, sizeof line, stdin) != NULL && strncmp(line, "close", 5) != 0; }

static int ask(const char *verb, double x, double *y, double *dy) {
  printf("%s %.17g\n", verb, x);
  fflush(stdout);
  if (!next_line()) exit(0);
  if (line[0] != '=') return 0;
  char *rest;
  *y = strtod(line + 1, &rest);
  if (dy != NULL) *dy = strtod(rest, NULL);
  return 1;
}

static int spin(double x) {
  double y;
  for (long count = 0;; count++)
    if (!ask("f", x + 1e-9 * count, &y, NULL)) return 0;
}

static int secant(double a, double b, double *root) {
  double fa, fb;
  if (!ask("f", a, &fa, NULL) || !ask("f", b, &fb, NULL)) return 0;
  for (int step = 0; step < 100 && fb != 0 && fb != fa; step++) {
    double x = b - fb * (b - a) / (fb - fa);
    printf("step %.17g\n", x);
    a = b, fa = fb;
    int near = fabs(x - b) <= 2.3e-16 * fabs(x);
    b = x;
    if (near) break;
    if (!ask("f", x, &fb, NULL)) return 0;
  }
  *root = b;
  return 1;
}

static int newton(double x, double *root) {
  double y, slope;
  for (int step = 0; step < 100; step++) {
    if (!ask("f", x, &y, NULL) || !ask("df", x, &slope, NULL)) return 0;
    if (y == 0 || fabs(y / slope) <= 2.3e-16 * fabs(x)) {
      *root = x;
      return 1;
    }
    x -= y / slope;
    printf("step %.17g\n", x);
  }
  return 0;
}

static int bisection(double a, double b, double *root) {
  double fa, y;
  if (!ask("f", a, &fa, NULL) || !ask("f", b, &y, NULL) || (fa < 0) == (y < 0)) return 0;
  for (;;) {
    double middle = a + (b - a) / 2;
    *root = middle;
    if (middle == a || middle == b) return 1;
    if (!ask("f", middle, &y, NULL)) return 0;
    if (y == 0) return 1;
    if ((y < 0) == (fa < 0)) a = middle;
    else b = middle;
  }
}

int main(void) {
  char id[32] = "", name[80] = "";
  double start[2] = {0, 0}, bracket[2] = {0, 0}, root = 0;
  while (next_line()) {
    if (strncmp(line, "open", 4) == 0) puts("ready 1 bench"), fflush(stdout);
    else if (sscanf(line, "solve %31s %79s", id, name) == 2) continue;
    else if (sscanf(line, "start %lf %lf", &start[0], &start[1]) >= 1) continue;
    else if (sscanf(line, "bracket %lf %lf", &bracket[0], &bracket[1]) == 2) continue;
    else if (strncmp(line, "go", 2) == 0) {
      int found = 0;
      if (strcmp(name, "spin") == 0) found = spin(start[0]);
      else if (strcmp(name, "secant") == 0) found = secant(start[0], start[1], &root);
      else if (strcmp(name, "newton") == 0) found = newton(start[0], &root);
      else if (strcmp(name, "bisection") == 0) found = bisection(bracket[0], bracket[1], &root);
      if (found) printf("root %s %.17g\n", id, root);
      else printf("fail %s\n", id);
      fflush(stdout);
    }
  }
  return 0;
}
