/* Hand-written scalar solver for comparison: the pair 5(4) of Dormand and Prince with its continuous extension, starting step and
 * proportional-integral controller of DOPRI5 (Hairer, Norsett, Wanner, Solving ODEs I, 2nd ed., II.4 and II.6), one member at a time.
 * RATES is 0 for predator-prey, 1 for the variant with two exponentials per rate. Not part of the package. */
#include <math.h>

#define N 2

static void rates(const double *p, const double *x, double *f)
{
#if RATES == 0
    f[0] = p[0] * x[0] - p[1] * x[0] * x[1];
    f[1] = -p[2] * x[1] + p[3] * x[0] * x[1];
#else
    f[0] = p[0] * x[0] * exp(-0.01 * x[0]) - p[1] * x[0] * x[1] * exp(-0.02 * x[1]);
    f[1] = -p[2] * x[1] * exp(-0.01 * x[1]) + p[3] * x[0] * x[1] * exp(-0.02 * x[0]);
#endif
}

static double norm(const double *v, const double *sc)
{
    double s = 0;
    for (int i = 0; i < N; i++) s += (v[i] / sc[i]) * (v[i] / sc[i]);
    return sqrt(s / N);
}

static double first_step(const double *p, const double *x, const double *f0, double span, double rtol, const double *atol)
{
    double sc[N], x1[N], f1[N], df[N];
    for (int i = 0; i < N; i++) sc[i] = atol[i] + rtol * fabs(x[i]);
    double d0 = norm(x, sc), d1 = norm(f0, sc);
    double h0 = (d0 < 1e-5 || d1 < 1e-5) ? 1e-6 * span : 0.01 * d0 / d1;
    if (h0 > span) h0 = span;
    for (int i = 0; i < N; i++) x1[i] = x[i] + h0 * f0[i];
    rates(p, x1, f1);
    for (int i = 0; i < N; i++) df[i] = f1[i] - f0[i];
    double most = fmax(d1, norm(df, sc) / h0);
    double h1 = most <= 1e-15 ? fmax(1e-6 * span, 1e-3 * h0) : pow(0.01 / most, 0.2);
    return fmin(fmin(100 * h0, h1), span);
}

/* Solves `members` members with inputs p [member, 6] (a, b, c, d, x0, y0); out [member, N, times]; returns the number of attempts. */
long solve_all(long members, const double *p6, long times, const double *ts, double rtol, const double *atol, double *out)
{
    long attempts = 0;
    for (long m = 0; m < members; m++) {
        const double *p = p6 + 6 * m;
        double x[N] = {p[4], p[5]}, k1[N], k2[N], k3[N], k4[N], k5[N], k6[N], k7[N], y[N], z[N];
        double t = 0, end = ts[times - 1], log_old = log(1e-4);
        long due = 0;
        int rejected = 0;
        double *o = out + m * N * times;
        rates(p, x, k1);
        double h = first_step(p, x, k1, end - t, rtol, atol);
        if (ts[0] == t) {
            for (int i = 0; i < N; i++) o[i * times] = x[i];
            due = 1;
        }
        while (t < end) {
            double left = end - t, hu = h;
            int last = 0;
            if (1.01 * h >= left) { hu = left; last = 1; }
            else if (2 * h >= left) hu = 0.5 * left;
            for (int i = 0; i < N; i++) y[i] = x[i] + hu * (1.0 / 5 * k1[i]);
            rates(p, y, k2);
            for (int i = 0; i < N; i++) y[i] = x[i] + hu * (3.0 / 40 * k1[i] + 9.0 / 40 * k2[i]);
            rates(p, y, k3);
            for (int i = 0; i < N; i++) y[i] = x[i] + hu * (44.0 / 45 * k1[i] - 56.0 / 15 * k2[i] + 32.0 / 9 * k3[i]);
            rates(p, y, k4);
            for (int i = 0; i < N; i++)
                y[i] = x[i] + hu * (19372.0 / 6561 * k1[i] - 25360.0 / 2187 * k2[i] + 64448.0 / 6561 * k3[i] - 212.0 / 729 * k4[i]);
            rates(p, y, k5);
            for (int i = 0; i < N; i++)
                y[i] = x[i] + hu * (9017.0 / 3168 * k1[i] - 355.0 / 33 * k2[i] + 46732.0 / 5247 * k3[i] + 49.0 / 176 * k4[i]
                                    - 5103.0 / 18656 * k5[i]);
            rates(p, y, k6);
            for (int i = 0; i < N; i++)
                z[i] = x[i] + hu * (35.0 / 384 * k1[i] + 500.0 / 1113 * k3[i] + 125.0 / 192 * k4[i] - 2187.0 / 6784 * k5[i]
                                    + 11.0 / 84 * k6[i]);
            rates(p, z, k7);
            double s = 0;
            for (int i = 0; i < N; i++) {
                double e = 71.0 / 57600 * k1[i] - 71.0 / 16695 * k3[i] + 71.0 / 1920 * k4[i] - 17253.0 / 339200 * k5[i]
                           + 22.0 / 525 * k6[i] - 1.0 / 40 * k7[i];
                double r = hu * e / (atol[i] + rtol * fmax(fabs(x[i]), fabs(z[i])));
                s += r * r;
            }
            double log_err = 0.5 * log(fmax(s / N, 1e-30));
            attempts++;
            if (s <= N) {
                double t_new = last ? end : t + hu;
                double fac = 0.9 * exp(-0.17 * log_err + 0.04 * log_old);
                fac = fmin(rejected ? 1.0 : 10.0, fmax(0.2, fac));
                if (due < times && ts[due] <= t_new) {
                    double c2[N], c3[N], c4[N], c5[N];
                    for (int i = 0; i < N; i++) {
                        c2[i] = z[i] - x[i];
                        c3[i] = hu * k1[i] - c2[i];
                        c4[i] = c2[i] - hu * k7[i] - c3[i];
                        c5[i] = hu * (-12715105075.0 / 11282082432 * k1[i] + 87487479700.0 / 32700410799 * k3[i]
                                      - 10690763975.0 / 1880347072 * k4[i] + 701980252875.0 / 199316789632 * k5[i]
                                      - 1453857185.0 / 822651844 * k6[i] + 69997945.0 / 29380423 * k7[i]);
                    }
                    do {
                        double th = (ts[due] - t) / hu, re = 1 - th;
                        for (int i = 0; i < N; i++)
                            o[i * times + due] = ts[due] == t_new ? z[i] : x[i] + th * (c2[i] + re * (c3[i] + th * (c4[i] + re * c5[i])));
                        due++;
                    } while (due < times && ts[due] <= t_new);
                }
                for (int i = 0; i < N; i++) { x[i] = z[i]; k1[i] = k7[i]; }
                t = t_new;
                log_old = fmax(log_err, log(1e-4));
                h = hu * fac < h && fac >= 1 ? h : hu * fac;
                rejected = 0;
            } else {
                h = hu * fmin(1.0, fmax(0.2, 0.9 * exp(-0.17 * log_err)));
                rejected = 1;
            }
        }
    }
    return attempts;
}
