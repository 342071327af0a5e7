/* Times CHOLMOD on one symmetric positive definite matrix: analyse, factorise, solve.
 * usage: cholmod FILE ROUNDS. FILE holds int32 n, int32 nnz, int32 column starts, int32 rows, float64 values of the upper triangle, and a
 * float64 right-hand side. Prints one JSON object with the least processor times in seconds: on a shared machine the clock says little. */
#include <cholmod.h>
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec + 1e-9 * t.tv_nsec;
}

static void take(void *to, size_t size, size_t count, FILE *file) {
  if (fread(to, size, count, file) != count) exit(2);
}

int main(int argc, char **argv) {
  if (argc < 3) return 2;
  FILE *file = fopen(argv[1], "rb");
  if (!file) return 2;
  int head[2];
  take(head, sizeof(int), 2, file);
  const int n = head[0], nnz = head[1];
  cholmod_common common;
  cholmod_start(&common);
  cholmod_sparse *a = cholmod_allocate_sparse(n, n, nnz, 1, 1, 1, CHOLMOD_REAL, &common);
  cholmod_dense *b = cholmod_allocate_dense(n, 1, n, CHOLMOD_REAL, &common);
  take(a->p, sizeof(int), n + 1, file);
  take(a->i, sizeof(int), nnz, file);
  take(a->x, sizeof(double), nnz, file);
  take(b->x, sizeof(double), n, file);
  fclose(file);
  double best[4] = {1e9, 1e9, 1e9, 1e9}, fill = 0, residual = 0;
  int super = 0;
  for (int round = 0; round < atoi(argv[2]); round++) {
    const double t0 = now();
    cholmod_factor *l = cholmod_analyze(a, &common);
    const double t1 = now();
    cholmod_factorize(a, l, &common);
    const double t2 = now();
    cholmod_dense *x = cholmod_solve(CHOLMOD_A, l, b, &common);
    const double t3 = now();
    const double taken[4] = {t1 - t0, t2 - t1, t3 - t2, t3 - t0};
    for (int k = 0; k < 4; k++) best[k] = fmin(best[k], taken[k]);
    double one[2] = {1, 0}, minus[2] = {-1, 0};
    cholmod_dense *rest = cholmod_copy_dense(b, &common);
    cholmod_sdmult(a, 0, minus, one, x, rest, &common);
    residual = cholmod_norm_dense(rest, 0, &common) / cholmod_norm_dense(b, 0, &common);
    fill = common.lnz;
    super = l->is_super;
    cholmod_free_dense(&rest, &common);
    cholmod_free_dense(&x, &common);
    cholmod_free_factor(&l, &common);
  }
  printf("{\"analyse\": %g, \"factorise\": %g, \"solve\": %g, \"all\": %g, \"fill\": %g, \"supernodal\": %s, \"residual\": %g}\n", best[0],
         best[1], best[2], best[3], fill, super ? "true" : "false", residual);
  return 0;
}
