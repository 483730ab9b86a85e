/*
 * log s_b(x) at b = 2^(1/4) by the sums that the engine uses (midpoint rule with residues near 0, residues alone beyond
 * Re x = Q/4), in Arb: the tables are made once, a call is the exponentials and the sums.
 *   near: -i [ sum_k w_k sin((2k+1) x h) - pi^2 x/(2h) + sum over beta of
 *              sum_n (-1)^n sinh(2 pi n beta x) phi_n/(n sin(pi n beta^2)) ],  phi_n = 1/(1 + exp(2 pi^2 n beta/h)),
 *         w_k = 4 e^(-Q t_k)/((2k+1) (1 - e^(-2 b t_k)) (1 - e^(-2 t_k/b))),  t_k = (k + 1/2) h,  2 pi/h = 3 Q/2;
 *   far:   i [ pi/2 (x^2 + (b^2 + b^-2)/12) + sum over beta of sum_n (-1)^n e^(-2 pi n beta x)/(2 n sin(pi n beta^2)) ].
 * Series run in powers damped by a power of two, as there, so that the recurrence does not blow up.
 */
#ifndef ARB_DOUBLE_SINE_H
#define ARB_DOUBLE_SINE_H
#include <acb.h>
#include <arb.h>
#include <math.h>

typedef struct {
  arb_ptr coefficients;
  slong length;
  slong scale;
} damped_series;

typedef struct {
  int near;
  double h;
  arb_t b[2];
  arb_t squares;
  damped_series nodes;
  damped_series poles[2];
} double_sine_table;

static void series_init(damped_series *series, slong length, slong scale) {
  series->coefficients = _arb_vec_init(length);
  series->length = length;
  series->scale = scale;
}

/* sum_n a_n 2^(-scale n) z^n with z 2^scale given: the real recurrence, two real products a term. */
static void series_sum(acb_t result, const damped_series *series, const acb_t z, slong prec) {
  arb_t twice, norm, here, before, next;
  acb_t damped;
  arb_init(twice);
  arb_init(norm);
  arb_init(here);
  arb_init(before);
  arb_init(next);
  acb_init(damped);
  acb_mul_2exp_si(damped, z, -series->scale);
  arb_mul_2exp_si(twice, acb_realref(damped), 1);
  arb_mul(norm, acb_realref(damped), acb_realref(damped), prec);
  arb_addmul(norm, acb_imagref(damped), acb_imagref(damped), prec);
  for (slong n = series->length - 1; n > 0; n--) {
    arb_set(next, series->coefficients + n);
    arb_addmul(next, twice, here, prec);
    arb_submul(next, norm, before, prec);
    arb_swap(before, here);
    arb_swap(here, next);
  }
  arb_mul(acb_imagref(result), acb_imagref(damped), here, prec);
  arb_set(next, series->coefficients);
  arb_addmul(next, acb_realref(damped), here, prec);
  arb_submul(next, norm, before, prec);
  arb_swap(acb_realref(result), next);
  arb_clear(twice);
  arb_clear(norm);
  arb_clear(here);
  arb_clear(before);
  arb_clear(next);
  acb_clear(damped);
}

static void pole_series(damped_series *series, const arb_t beta, double h, int near, double q, double depth, slong wide) {
  double rough = arf_get_d(arb_midref(beta), ARF_RND_NEAR);
  double reach = q / 4;
  /* Near: poles below depth/Q; far: e^(-2 pi n beta Q/4) below e^(-depth). */
  slong last = near ? (slong)(depth / q / (M_PI * rough)) : (slong)ceil(depth / (2 * M_PI * rough * reach));
  slong scale = near ? (slong)ceil(2 * M_PI * rough * reach / M_LN2) + 1 : 1 - (slong)floor(2 * M_PI * rough * reach / M_LN2);
  arb_t term, phi;
  series_init(series, last + 1, scale);
  arb_init(term);
  arb_init(phi);
  for (slong n = 1; n <= last; n++) {
    arb_mul(term, beta, beta, wide);
    arb_mul_si(term, term, n, wide);
    arb_sin_pi(term, term, wide);
    arb_mul_si(term, term, n % 2 ? -n : n, wide);
    arb_inv(term, term, wide);
    if (near) {
      arb_const_pi(phi, wide);
      arb_mul(phi, phi, phi, wide);
      arb_mul(phi, phi, beta, wide);
      arb_mul_si(phi, phi, 2 * n, wide);
      arf_t step;
      arf_init(step);
      arf_set_d(step, h);
      arb_div_arf(phi, phi, step, wide);
      arf_clear(step);
      arb_exp(phi, phi, wide);
      arb_add_si(phi, phi, 1, wide);
      arb_div(term, term, phi, wide);
    }
    arb_mul_2exp_si(series->coefficients + n, term, scale * n - 1);
  }
  arb_clear(term);
  arb_clear(phi);
}

static void node_series(double_sine_table *table, double q, double depth, slong wide) {
  double h = table->h;
  slong last = (slong)ceil(depth / ((q - 0.5 * q) * h)) + 1;
  slong scale = (slong)ceil(q * h / (2 * M_LN2)) + 1;
  series_init(&table->nodes, last, scale);
  arb_t t, below, part;
  arb_init(t);
  arb_init(below);
  arb_init(part);
  for (slong k = 0; k < last; k++) {
    arb_ptr weight = table->nodes.coefficients + k;
    arb_one(weight);
    arb_set_si(below, 2 * k + 1);
    for (int i = 0; i < 2; i++) {
      arf_set_d(arb_midref(t), h);
      mag_zero(arb_radref(t));
      arb_mul_si(t, t, 2 * k + 1, wide);
      arb_mul(t, t, table->b[i], wide);
      arb_neg(t, t);
      arb_exp(part, t, wide);
      arb_sub_si(part, part, 1, wide);
      arb_neg(part, part);
      arb_mul(below, below, part, wide);
      arb_mul_2exp_si(t, t, -1);
      arb_exp(part, t, wide);
      arb_mul(weight, weight, part, wide);
    }
    arb_div(weight, weight, below, wide);
    arb_mul_2exp_si(weight, weight, 2 + scale * k);
  }
  arb_clear(t);
  arb_clear(below);
  arb_clear(part);
}

static void double_sine_table_init(double_sine_table *table, int near, slong bits) {
  slong wide = 2 * bits + 100;
  double q = pow(2, 0.25) + pow(2, -0.25);
  double depth = (bits + 12) * M_LN2;
  table->near = near;
  /* 40 bits, so that h is the same number in both sums. */
  table->h = ldexp(round(ldexp(2 * M_PI / (1.5 * q), 40)), -40);
  arb_init(table->b[0]);
  arb_init(table->b[1]);
  arb_init(table->squares);
  arb_set_si(table->b[0], 2);
  arb_root_ui(table->b[0], table->b[0], 4, wide);
  arb_inv(table->b[1], table->b[0], wide);
  arb_mul(table->squares, table->b[0], table->b[0], wide);
  arb_addmul(table->squares, table->b[1], table->b[1], wide);
  arb_div_si(table->squares, table->squares, 12, wide);
  for (int i = 0; i < 2; i++) pole_series(&table->poles[i], table->b[i], table->h, near, q, depth, wide);
  if (near) node_series(table, q, depth, wide);
}

static void add_poles(acb_t sum, const double_sine_table *table, const acb_t x, slong prec) {
  acb_t theta, up, part;
  acb_init(theta);
  acb_init(up);
  acb_init(part);
  for (int i = 0; i < 2; i++) {
    acb_const_pi(theta, prec);
    acb_mul_arb(theta, theta, table->b[i], prec);
    acb_mul(theta, theta, x, prec);
    acb_mul_2exp_si(theta, theta, 1);
    if (!table->near) acb_neg(theta, theta);
    acb_exp(up, theta, prec);
    series_sum(part, &table->poles[i], up, prec);
    acb_add(sum, sum, part, prec);
    if (table->near) {
      acb_inv(up, up, prec);
      series_sum(part, &table->poles[i], up, prec);
      acb_sub(sum, sum, part, prec);
    }
  }
  acb_clear(theta);
  acb_clear(up);
  acb_clear(part);
}

/* [e^(ixh) P(e^(2ixh)) - e^(-ixh) P(e^(-2ixh))]/(2i). */
static void add_nodes(acb_t sum, const double_sine_table *table, const acb_t x, slong prec) {
  acb_t turn, square, up, down;
  arf_t h;
  acb_init(turn);
  acb_init(square);
  acb_init(up);
  acb_init(down);
  arf_init(h);
  arf_set_d(h, table->h);
  arb_mul_arf(acb_realref(turn), acb_realref(x), h, prec);
  arb_mul_arf(acb_imagref(turn), acb_imagref(x), h, prec);
  acb_mul_onei(turn, turn);
  acb_exp(turn, turn, prec);
  acb_mul(square, turn, turn, prec);
  series_sum(up, &table->nodes, square, prec);
  acb_mul(up, up, turn, prec);
  acb_inv(turn, turn, prec);
  acb_mul(square, turn, turn, prec);
  series_sum(down, &table->nodes, square, prec);
  acb_mul(down, down, turn, prec);
  acb_sub(up, up, down, prec);
  acb_mul_onei(up, up);
  acb_mul_2exp_si(up, up, -1);
  acb_sub(sum, sum, up, prec);
  acb_clear(turn);
  acb_clear(square);
  acb_clear(up);
  acb_clear(down);
  arf_clear(h);
}

static void double_sine(acb_t result, const acb_t x, const double_sine_table *table, slong prec) {
  acb_t sum, part;
  arf_t h;
  /* The sums need some bits more, as the engine's do. */
  prec += 24;
  acb_init(sum);
  acb_init(part);
  arf_init(h);
  arf_set_d(h, table->h);
  acb_const_pi(part, prec);
  if (table->near) {
    acb_mul(part, part, part, prec);
    acb_mul(part, part, x, prec);
    arb_div_arf(acb_realref(part), acb_realref(part), h, prec);
    arb_div_arf(acb_imagref(part), acb_imagref(part), h, prec);
    acb_mul_2exp_si(part, part, -1);
    acb_sub(sum, sum, part, prec);
    add_nodes(sum, table, x, prec);
  } else {
    acb_mul(sum, x, x, prec);
    acb_add_arb(sum, sum, table->squares, prec);
    acb_mul(sum, sum, part, prec);
    acb_mul_2exp_si(sum, sum, -1);
  }
  add_poles(sum, table, x, prec);
  acb_mul_onei(result, sum);
  if (table->near) acb_neg(result, result);
  acb_clear(sum);
  acb_clear(part);
  arf_clear(h);
}
#endif
