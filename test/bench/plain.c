/* The jobs of the bench as plain C loops: cc -O3. Prints one line "job seconds" each, the median of several runs.
 * Arguments: the Touchstone file of the reading job, or "probe" for the first job alone. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

typedef struct {
  double re, im;
} cplx;

static inline cplx mul(cplx a, cplx b) { return (cplx){a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re}; }
static inline cplx add(cplx a, cplx b) { return (cplx){a.re + b.re, a.im + b.im}; }
static inline cplx sub(cplx a, cplx b) { return (cplx){a.re - b.re, a.im - b.im}; }
static inline cplx inverse(cplx a) {
  double scale = 1 / (a.re * a.re + a.im * a.im);
  return (cplx){a.re * scale, -a.im * scale};
}

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_MONOTONIC, &t);
  return t.tv_sec + 1e-9 * t.tv_nsec;
}

static int ascending(const void *a, const void *b) {
  double x = *(const double *)a, y = *(const double *)b;
  return (x > y) - (x < y);
}

static void report(const char *job, double *times, int runs) {
  qsort(times, runs, sizeof *times, ascending);
  printf("%s %.9g\n", job, times[runs / 2]);
}

static unsigned seed = 1;
static double uniform(void) {
  seed = seed * 1664525u + 1013904223u;
  return seed / 4294967296.0;
}

/* Star product of two-ports: out = a followed by b. */
static void cascade2(cplx *out, const cplx *a, const cplx *b, int points) {
  for (int k = 0; k < points; k++, out += 4, a += 4, b += 4) {
    cplx d = inverse(sub((cplx){1, 0}, mul(a[3], b[0])));
    cplx u = mul(a[2], d), v = mul(b[1], d);
    cplx s11 = add(a[0], mul(mul(a[1], b[0]), u));
    cplx s12 = mul(a[1], v);
    cplx s21 = mul(b[2], u);
    cplx s22 = add(b[3], mul(mul(b[2], a[3]), v));
    out[0] = s11, out[1] = s12, out[2] = s21, out[3] = s22;
  }
}

static void product(cplx out[4], const cplx a[4], const cplx b[4]) {
  out[0] = add(mul(a[0], b[0]), mul(a[1], b[2]));
  out[1] = add(mul(a[0], b[1]), mul(a[1], b[3]));
  out[2] = add(mul(a[2], b[0]), mul(a[3], b[2]));
  out[3] = add(mul(a[2], b[1]), mul(a[3], b[3]));
}

static void block(cplx out[4], const cplx *s, int row, int column) {
  out[0] = s[row * 4 + column], out[1] = s[row * 4 + column + 1];
  out[2] = s[(row + 1) * 4 + column], out[3] = s[(row + 1) * 4 + column + 1];
}

static void place(cplx *s, int row, int column, const cplx m[4]) {
  s[row * 4 + column] = m[0], s[row * 4 + column + 1] = m[1];
  s[(row + 1) * 4 + column] = m[2], s[(row + 1) * 4 + column + 1] = m[3];
}

static void sum(cplx out[4], const cplx a[4], const cplx b[4]) {
  for (int i = 0; i < 4; i++) out[i] = add(a[i], b[i]);
}

/* The same with 2 x 2 blocks. */
static void cascade4(cplx *out, const cplx *a, const cplx *b, int points) {
  for (int k = 0; k < points; k++, out += 16, a += 16, b += 16) {
    cplx a11[4], a12[4], a21[4], a22[4], b11[4], b12[4], b21[4], b22[4];
    block(a11, a, 0, 0), block(a12, a, 0, 2), block(a21, a, 2, 0), block(a22, a, 2, 2);
    block(b11, b, 0, 0), block(b12, b, 0, 2), block(b21, b, 2, 0), block(b22, b, 2, 2);
    cplx m[4], n[4], r[4], y1[4], y2[4], z[4], t[4], w[4];
    product(m, a22, b11);
    for (int i = 0; i < 4; i++) m[i] = sub((cplx){i % 3 == 0, 0}, m[i]);
    cplx d = inverse(sub(mul(m[0], m[3]), mul(m[1], m[2])));
    cplx minus = (cplx){-d.re, -d.im};
    n[0] = mul(m[3], d), n[1] = mul(m[1], minus), n[2] = mul(m[2], minus), n[3] = mul(m[0], d);
    product(y1, n, a21);
    product(r, a22, b12);
    product(y2, n, r);
    product(z, b11, y1), product(t, a12, z), sum(w, a11, t), place(out, 0, 0, w);
    product(z, b11, y2), sum(z, z, b12), product(t, a12, z), place(out, 0, 2, t);
    product(t, b21, y1), place(out, 2, 0, t);
    product(t, b21, y2), sum(w, b22, t), place(out, 2, 2, w);
  }
}

static void cascades(const char *job, int ports, int runs) {
  enum { sections = 20, points = 2001 };
  int size = ports * ports * points;
  cplx *s = malloc(sizeof(cplx) * sections * size), *out = malloc(sizeof(cplx) * size);
  for (int i = 0; i < sections * size; i++) s[i] = (cplx){(uniform() - 0.5) * 0.6, (uniform() - 0.5) * 0.6};
  double *times = malloc(sizeof(double) * runs);
  for (int run = 0; run < runs; run++) {
    double started = now();
    memcpy(out, s, sizeof(cplx) * size);
    for (int k = 1; k < sections; k++)
      if (ports == 2) cascade2(out, out, s + k * size, points);
      else cascade4(out, out, s + k * size, points);
    times[run] = now() - started;
    if (out[run % size].re == 12345) puts("# never");
  }
  report(job, times, runs);
  free(s), free(out), free(times);
}

static cplx quotient(cplx a, cplx b) { return mul(a, inverse(b)); }

/* S of a line between 50 ohm ports, from its reflection and one pass. */
static void line(cplx *s, const double *hz, int points, double z0, double length, double ee, double root, double linear) {
  double g = (z0 - 50) / (z0 + 50);
  double turn = 2 * M_PI * sqrt(ee) * length / 299792458.0;
  for (int k = 0; k < points; k++, s += 4) {
    double gigahertz = hz[k] * 1e-9;
    double loss = (root * sqrt(gigahertz) + linear * gigahertz) * length / 8.685889638065035;
    double one = exp(-loss), phase = turn * hz[k];
    cplx p = {one * cos(phase), -one * sin(phase)};
    cplx square = mul(p, p);
    cplx d = {1 - g * g * square.re, -g * g * square.im};
    cplx back = quotient((cplx){g * (1 - square.re), -g * square.im}, d);
    cplx on = quotient((cplx){p.re * (1 - g * g), p.im * (1 - g * g)}, d);
    s[0] = s[3] = back, s[1] = s[2] = on;
  }
}

static void series(cplx *s, const double *hz, int points, double ohm, double henry) {
  for (int k = 0; k < points; k++, s += 4) {
    cplx q = {ohm / 100, 2 * M_PI * hz[k] * henry / 100};
    cplx on = inverse((cplx){1 + q.re, q.im});
    s[0] = s[3] = mul(q, on), s[1] = s[2] = on;
  }
}

static void shunt(cplx *s, const double *hz, int points, double farad) {
  for (int k = 0; k < points; k++, s += 4) {
    cplx q = {0, 2 * M_PI * hz[k] * farad * 25};
    cplx on = inverse((cplx){1 + q.re, q.im});
    cplx back = mul(q, on);
    s[0] = s[3] = (cplx){-back.re, -back.im}, s[1] = s[2] = on;
  }
}

static void trials(int runs) {
  enum { points = 500, elements = 20 };
  double hz[points], *times = malloc(sizeof(double) * runs);
  cplx s[points * 4], next[points * 4];
  for (int k = 0; k < points; k++) hz[k] = (k + 1) * 4e7;
  for (int run = 0; run < runs; run++) {
    double started = now();
    for (int trial = 0; trial < 1000; trial++)
      for (int k = 0; k < elements; k++) {
        cplx *to = k ? next : s;
        if (k % 4 == 1) series(to, hz, points, uniform(), uniform() * 1e-10);
        else if (k % 4 == 3) shunt(to, hz, points, uniform() * 1e-13);
        else line(to, hz, points, 40 + 20 * uniform(), 0.02 * uniform(), 3 + uniform(), 5 * uniform(), 5 * uniform());
        if (k) cascade2(s, s, next, points);
      }
    times[run] = now() - started;
    if (s[run].re == 12345) puts("# never");
  }
  report("trials", times, runs);
  free(times);
}

static void reading(const char *path, int runs) {
  double *times = malloc(sizeof(double) * runs);
  for (int run = 0; run < runs; run++) {
    double started = now();
    FILE *file = fopen(path, "rb");
    if (!file) exit(1);
    fseek(file, 0, SEEK_END);
    long bytes = ftell(file);
    rewind(file);
    char *text = malloc(bytes + 1);
    if (fread(text, 1, bytes, file) != (size_t)bytes) exit(1);
    text[bytes] = 0;
    fclose(file);
    double *values = malloc(sizeof(double) * (bytes / 2 + 1));
    long count = 0;
    char *at = text;
    while (*at) {
      if (*at == '!' || *at == '#') {
        while (*at && *at != '\n') at++;
        continue;
      }
      char *end;
      double value = strtod(at, &end);
      if (end == at) {
        at++;
        continue;
      }
      values[count++] = value;
      at = end;
    }
    times[run] = now() - started;
    if (count != 10000L * 33) fprintf(stderr, "read %ld numbers\n", count), exit(1);
    free(text), free(values);
  }
  report("read-4x10000", times, runs);
  free(times);
}

int main(int argc, char **argv) {
  if (argc != 2) return 1;
  cascades("cascade-2-ports-20x2001", 2, 101);
  if (!strcmp(argv[1], "probe")) return 0;
  cascades("cascade-4-ports-20x2001", 4, 51);
  trials(3);
  reading(argv[1], 7);
  return 0;
}
