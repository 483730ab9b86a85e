/*
 * Times one function of Arb and prints its value, for the bench.
 *   arb-peer NAME BITS RE IM
 * The argument is (RE + i IM)/2^BITS. Prints microseconds of processor time a call, then real and imaginary part times
 * 2^(BITS + 40), rounded: first as computed with BITS bits, then with 80 more.
 */
#include <acb.h>
#include <acb_hypgeom.h>
#include <acb_poly.h>
#include <arb.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>
#include "arb-double-sine.h"

static double now(void) {
  struct timespec t;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
  return t.tv_sec * 1e6 + t.tv_nsec * 1e-3;
}

/* d/ds zeta(s, z) at s = -k. */
static void zeta_derivative(acb_t result, const acb_t z, slong k, slong prec) {
  acb_t s;
  acb_ptr series = _acb_vec_init(2);
  acb_init(s);
  acb_set_si(s, -k);
  _acb_poly_zeta_cpx_series(series, s, z, 0, 2, prec);
  acb_set(result, series + 1);
  _acb_vec_clear(series, 2);
  acb_clear(s);
}

/* zeta'(-1) + (z - 1)/2 log(2 pi) - log G(z). */
static void double_gamma(acb_t result, const acb_t z, slong prec) {
  acb_t one, sum;
  arb_t log_two_pi;
  acb_init(one);
  acb_init(sum);
  arb_init(log_two_pi);
  acb_one(one);
  zeta_derivative(sum, one, 1, prec);
  arb_const_pi(log_two_pi, prec);
  arb_mul_2exp_si(log_two_pi, log_two_pi, 1);
  arb_log(log_two_pi, log_two_pi, prec);
  acb_sub(one, z, one, prec);
  acb_mul_2exp_si(one, one, -1);
  acb_mul_arb(one, one, log_two_pi, prec);
  acb_add(sum, sum, one, prec);
  acb_log_barnes_g(result, z, prec);
  acb_sub(result, sum, result, prec);
  acb_clear(one);
  acb_clear(sum);
  arb_clear(log_two_pi);
}

static void compute(acb_t result, const char *name, const acb_t z, const double_sine_table *table, slong prec) {
  if (!strcmp(name, "exp")) acb_exp(result, z, prec);
  else if (!strcmp(name, "log")) acb_log(result, z, prec);
  else if (!strcmp(name, "log-gamma")) acb_lgamma(result, z, prec);
  else if (!strcmp(name, "dilogarithm")) acb_polylog_si(result, 2, z, prec);
  else if (!strcmp(name, "zeta-derivative-0")) zeta_derivative(result, z, 0, prec);
  else if (!strcmp(name, "zeta-derivative-1")) zeta_derivative(result, z, 1, prec);
  else if (!strcmp(name, "zeta-derivative-2")) zeta_derivative(result, z, 2, prec);
  else if (!strcmp(name, "double-gamma")) double_gamma(result, z, prec);
  else double_sine(result, z, table, prec);
}

static void print_part(const arb_t x, slong bits) {
  arb_t scaled;
  fmpz_t whole;
  arb_init(scaled);
  fmpz_init(whole);
  arb_mul_2exp_si(scaled, x, bits + 40);
  arf_get_fmpz(whole, arb_midref(scaled), ARF_RND_NEAR);
  putchar(' ');
  fmpz_print(whole);
  arb_clear(scaled);
  fmpz_clear(whole);
}

static void read_part(arb_t x, const char *text, slong bits) {
  fmpz_t whole;
  fmpz_init(whole);
  if (fmpz_set_str(whole, text, 10)) exit(2);
  arb_set_fmpz(x, whole);
  arb_mul_2exp_si(x, x, -bits);
  fmpz_clear(whole);
}

int main(int count, char **words) {
  if (count != 5) return 2;
  const char *name = words[1];
  slong bits = atol(words[2]);
  acb_t z, value;
  acb_init(z);
  acb_init(value);
  read_part(acb_realref(z), words[3], bits);
  read_part(acb_imagref(z), words[4], bits);
  int needs_table = !strcmp(name, "double-sine-near") || !strcmp(name, "double-sine-far");
  int near = !strcmp(name, "double-sine-near");
  double_sine_table table, finer;
  if (needs_table) {
    double_sine_table_init(&table, near, bits);
    double_sine_table_init(&finer, near, bits + 80);
  }
  compute(value, name, z, &table, bits);
  double passed = 0;
  long calls = 1;
  for (;; calls *= 2) {
    double start = now();
    for (long i = 0; i < calls; i++) compute(value, name, z, &table, bits);
    passed = now() - start;
    if (passed > 20000) break;
  }
  printf("%.6f", passed / calls);
  print_part(acb_realref(value), bits);
  print_part(acb_imagref(value), bits);
  compute(value, name, z, &finer, bits + 80);
  print_part(acb_realref(value), bits);
  print_part(acb_imagref(value), bits);
  putchar('\n');
  return 0;
}
