/* Two processes that send a short line to and fro over two pipes: the least that a wire of lines can cost.
   Prints the microseconds of one round trip. */
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <sys/wait.h>
#include <time.h>
#include <unistd.h>

static const char ask[] = "f 1.4142135623730951\n";
static const char answer[] = "= 4.440892098500626e-16\n";

static void echo(int from, int to) {
  char line[256];
  while (read(from, line, sizeof line) > 0)
    if (write(to, answer, sizeof answer - 1) < 0) break;
  _exit(0);
}

int main(int argc, char **argv) {
  long rounds = argc > 1 ? atol(argv[1]) : 20000;
  int down[2], up[2];
  if (pipe(down) != 0 || pipe(up) != 0) return 1;
  if (fork() == 0) {
    close(down[1]);
    close(up[0]);
    echo(down[0], up[1]);
  }
  close(down[0]);
  close(up[1]);
  char line[256];
  struct timespec from, to;
  clock_gettime(CLOCK_MONOTONIC, &from);
  for (long round = 0; round < rounds; round++)
    if (write(down[1], ask, sizeof ask - 1) < 0 || read(up[0], line, sizeof line) <= 0) return 1;
  clock_gettime(CLOCK_MONOTONIC, &to);
  double ns = (to.tv_sec - from.tv_sec) * 1e9 + (to.tv_nsec - from.tv_nsec);
  printf("%.3f\n", ns / 1000 / rounds);
  close(down[1]);
  wait(NULL);
  return 0;
}
