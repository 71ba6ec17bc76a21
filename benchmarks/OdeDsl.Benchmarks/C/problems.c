/* The public problems in plain C, to measure emitted C# against: rates and dense Jacobians by rows, zeros written too.
   Formulas as a person writes them, intermediate results named where they occur twice; the compiler does the rest. */
#include <math.h>
#include <string.h>

typedef void function(const double *restrict x, const double *restrict p, double *restrict out);

static void lorenz63_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    f[0] = p[0] * (x[1] - x[0]);
    f[1] = x[0] * (p[1] - x[2]) - x[1];
    f[2] = x[0] * x[1] - p[2] * x[2];
}

static void lorenz63_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    j[0] = -p[0];       j[1] = p[0];  j[2] = 0;
    j[3] = p[1] - x[2]; j[4] = -1;    j[5] = -x[0];
    j[6] = x[1];        j[7] = x[0];  j[8] = -p[2];
}

static void lotka_volterra_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    f[0] = p[0] * x[0] - p[1] * x[0] * x[1];
    f[1] = -p[2] * x[1] + p[3] * x[0] * x[1];
}

static void lotka_volterra_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    j[0] = p[0] - p[1] * x[1]; j[1] = -p[1] * x[0];
    j[2] = p[3] * x[1];        j[3] = p[3] * x[0] - p[2];
}

static void van_der_pol_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    f[0] = x[1];
    f[1] = p[0] * (1 - x[0] * x[0]) * x[1] - x[0];
}

static void van_der_pol_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    j[0] = 0;                              j[1] = 1;
    j[2] = -2 * p[0] * x[0] * x[1] - 1;    j[3] = p[0] * (1 - x[0] * x[0]);
}

static const double moon = 0.012277471, earth = 1 - 0.012277471;

static void arenstorf_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    double a = x[0] + moon, b = x[0] - earth;
    double earth_cube = pow(a * a + x[1] * x[1], 1.5), moon_cube = pow(b * b + x[1] * x[1], 1.5);
    f[0] = x[2];
    f[1] = x[3];
    f[2] = x[0] + 2 * x[3] - earth * a / earth_cube - moon * b / moon_cube;
    f[3] = x[1] - 2 * x[2] - earth * x[1] / earth_cube - moon * x[1] / moon_cube;
}

static void arenstorf_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    double a = x[0] + moon, b = x[0] - earth, y = x[1];
    double d1 = a * a + y * y, d2 = b * b + y * y;
    double g1 = earth / pow(d1, 1.5), g2 = moon / pow(d2, 1.5), h1 = 3 * g1 / d1, h2 = 3 * g2 / d2;
    memset(j, 0, 16 * sizeof(double));
    j[2] = 1;
    j[7] = 1;
    j[8] = 1 - g1 - g2 + h1 * a * a + h2 * b * b;
    j[9] = (h1 * a + h2 * b) * y;
    j[11] = 2;
    j[12] = j[9];
    j[13] = 1 - g1 - g2 + (h1 + h2) * y * y;
    j[14] = -2;
}

static void pleiades_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    double ax[7] = {0}, ay[7] = {0};
    for (int i = 0; i < 7; i++)
    {
        for (int k = i + 1; k < 7; k++)
        {
            double dx = x[k] - x[i], dy = x[k + 7] - x[i + 7], square = dx * dx + dy * dy, w = 1 / (square * sqrt(square));
            ax[i] += (k + 1) * dx * w;
            ay[i] += (k + 1) * dy * w;
            ax[k] -= (i + 1) * dx * w;
            ay[k] -= (i + 1) * dy * w;
        }
    }

    for (int i = 0; i < 14; i++) f[i] = x[i + 14];
    for (int i = 0; i < 7; i++)
    {
        f[i + 14] = ax[i];
        f[i + 21] = ay[i];
    }
}

static void pleiades_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    memset(j, 0, 784 * sizeof(double));
    for (int i = 0; i < 14; i++) j[i * 28 + i + 14] = 1;
    for (int i = 0; i < 7; i++)
    {
        for (int k = i + 1; k < 7; k++)
        {
            double dx = x[k] - x[i], dy = x[k + 7] - x[i + 7], square = dx * dx + dy * dy, w = 1 / (square * sqrt(square));
            double c = 3 * w / square, xx = w - c * dx * dx, xy = -c * dx * dy, yy = w - c * dy * dy;
            double mi = i + 1, mk = k + 1;
            double *xi = j + (i + 14) * 28, *yi = j + (i + 21) * 28, *xk = j + (k + 14) * 28, *yk = j + (k + 21) * 28;
            xi[k] = mk * xx;     xi[i] -= mk * xx;     xi[k + 7] = mk * xy; xi[i + 7] -= mk * xy;
            yi[k] = mk * xy;     yi[i] -= mk * xy;     yi[k + 7] = mk * yy; yi[i + 7] -= mk * yy;
            xk[i] = mi * xx;     xk[k] -= mi * xx;     xk[i + 7] = mi * xy; xk[k + 7] -= mi * xy;
            yk[i] = mi * xy;     yk[k] -= mi * xy;     yk[i + 7] = mi * yy; yk[k + 7] -= mi * yy;
        }
    }
}

static void robertson_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    f[0] = -p[0] * x[0] + p[1] * x[1] * x[2];
    f[1] = p[0] * x[0] - p[1] * x[1] * x[2] - p[2] * x[1] * x[1];
    f[2] = p[2] * x[1] * x[1];
}

static void robertson_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    j[0] = -p[0]; j[1] = p[1] * x[2];                       j[2] = p[1] * x[1];
    j[3] = p[0];  j[4] = -p[1] * x[2] - 2 * p[2] * x[1];    j[5] = -p[1] * x[1];
    j[6] = 0;     j[7] = 2 * p[2] * x[1];                   j[8] = 0;
}

static void e5_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    const double a = 7.89e-10, b = 1.1e7, c = 1.13e3, m = 1e6;
    f[0] = -a * x[0] - b * x[0] * x[2];
    f[1] = a * x[0] - m * c * x[1] * x[2];
    f[3] = b * x[0] * x[2] - c * x[3];
    f[2] = f[1] - f[3];
}

static void e5_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    const double a = 7.89e-10, b = 1.1e7, c = 1.13e3, mc = 1e6 * 1.13e3;
    j[0] = -a - b * x[2];  j[1] = 0;            j[2] = -b * x[0];               j[3] = 0;
    j[4] = a;              j[5] = -mc * x[2];   j[6] = -mc * x[1];              j[7] = 0;
    j[8] = a - b * x[2];   j[9] = -mc * x[2];   j[10] = -mc * x[1] - b * x[0];  j[11] = c;
    j[12] = b * x[2];      j[13] = 0;           j[14] = b * x[0];               j[15] = -c;
}

static void hires_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    f[0] = -1.71 * x[0] + 0.43 * x[1] + 8.32 * x[2] + 0.0007;
    f[1] = 1.71 * x[0] - 8.75 * x[1];
    f[2] = -10.03 * x[2] + 0.43 * x[3] + 0.035 * x[4];
    f[3] = 8.32 * x[1] + 1.71 * x[2] - 1.12 * x[3];
    f[4] = -1.745 * x[4] + 0.43 * x[5] + 0.43 * x[6];
    f[5] = -280 * x[5] * x[7] + 0.69 * x[3] + 1.71 * x[4] - 0.43 * x[5] + 0.69 * x[6];
    f[6] = 280 * x[5] * x[7] - 1.81 * x[6];
    f[7] = -280 * x[5] * x[7] + 1.81 * x[6];
}

static void hires_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    memset(j, 0, 64 * sizeof(double));
    j[0] = -1.71; j[1] = 0.43; j[2] = 8.32;
    j[8] = 1.71; j[9] = -8.75;
    j[18] = -10.03; j[19] = 0.43; j[20] = 0.035;
    j[25] = 8.32; j[26] = 1.71; j[27] = -1.12;
    j[36] = -1.745; j[37] = 0.43; j[38] = 0.43;
    j[43] = 0.69; j[44] = 1.71; j[45] = -280 * x[7] - 0.43; j[46] = 0.69; j[47] = -280 * x[5];
    j[53] = 280 * x[7]; j[54] = -1.81; j[55] = 280 * x[5];
    j[61] = -280 * x[7]; j[62] = 1.81; j[63] = -280 * x[5];
}

static void orego_rates(const double *restrict x, const double *restrict p, double *restrict f)
{
    f[0] = 77.27 * (x[1] + x[0] * (1 - 8.375e-6 * x[0] - x[1]));
    f[1] = (x[2] - (1 + x[0]) * x[1]) / 77.27;
    f[2] = 0.161 * (x[0] - x[2]);
}

static void orego_jacobian(const double *restrict x, const double *restrict p, double *restrict j)
{
    j[0] = 77.27 * (1 - 2 * 8.375e-6 * x[0] - x[1]); j[1] = 77.27 * (1 - x[0]);  j[2] = 0;
    j[3] = -x[1] / 77.27;                            j[4] = -(1 + x[0]) / 77.27; j[5] = 1 / 77.27;
    j[6] = 0.161;                                    j[7] = 0;                   j[8] = -0.161;
}

static void pollution_rates(const double *restrict y, const double *restrict p, double *restrict f)
{
    double r1 = 0.35 * y[0], r2 = 26.6 * y[1] * y[3], r3 = 1.23e4 * y[4] * y[1], r4 = 8.6e-4 * y[6], r5 = 8.2e-4 * y[6];
    double r6 = 1.5e4 * y[6] * y[5], r7 = 1.3e-4 * y[8], r8 = 2.4e4 * y[8] * y[5], r9 = 1.65e4 * y[10] * y[1], r10 = 9e3 * y[10] * y[0];
    double r11 = 0.022 * y[12], r12 = 1.2e4 * y[9] * y[1], r13 = 1.88 * y[13], r14 = 1.63e4 * y[0] * y[5], r15 = 4.8e6 * y[2];
    double r16 = 3.5e-4 * y[3], r17 = 0.0175 * y[3], r18 = 1e8 * y[15], r19 = 4.44e11 * y[15], r20 = 1240 * y[16] * y[5];
    double r21 = 2.1 * y[18], r22 = 5.78 * y[18], r23 = 0.0474 * y[0] * y[3], r24 = 1780 * y[18] * y[0], r25 = 3.12 * y[19];
    f[0] = r2 + r3 + r9 + r11 + r12 + r22 + r25 - r1 - r10 - r14 - r23 - r24;
    f[1] = r1 + r21 - r2 - r3 - r9 - r12;
    f[2] = r1 + r17 + r19 + r22 - r15;
    f[3] = r15 - r2 - r16 - r17 - r23;
    f[4] = 2 * r4 + r6 + r7 + r13 + r20 - r3;
    f[5] = r3 + 2 * r18 - r6 - r8 - r14 - r20;
    f[6] = r13 - r4 - r5 - r6;
    f[7] = r4 + r5 + r6 + r7;
    f[8] = -r7 - r8;
    f[9] = r7 + r9 - r12;
    f[10] = r8 + r11 - r9 - r10;
    f[11] = r9;
    f[12] = r10 - r11;
    f[13] = r12 - r13;
    f[14] = r14;
    f[15] = r16 - r18 - r19;
    f[16] = -r20;
    f[17] = r20;
    f[18] = r23 + r25 - r21 - r22 - r24;
    f[19] = r24 - r25;
}

static void pollution_jacobian(const double *restrict y, const double *restrict p, double *restrict jacobian)
{
    /* d<reaction>_<species> */
    double d2_2 = 26.6 * y[3], d2_4 = 26.6 * y[1], d3_5 = 1.23e4 * y[1], d3_2 = 1.23e4 * y[4], d6_7 = 1.5e4 * y[5], d6_6 = 1.5e4 * y[6];
    double d8_9 = 2.4e4 * y[5], d8_6 = 2.4e4 * y[8], d9_11 = 1.65e4 * y[1], d9_2 = 1.65e4 * y[10], d10_11 = 9e3 * y[0], d10_1 = 9e3 * y[10];
    double d12_10 = 1.2e4 * y[1], d12_2 = 1.2e4 * y[9], d14_1 = 1.63e4 * y[5], d14_6 = 1.63e4 * y[0], d20_17 = 1240 * y[5], d20_6 = 1240 * y[16];
    double d23_1 = 0.0474 * y[3], d23_4 = 0.0474 * y[0], d24_19 = 1780 * y[0], d24_1 = 1780 * y[18];
    double (*j)[20] = (double (*)[20])jacobian;
    memset(jacobian, 0, 400 * sizeof(double));
    j[0][0] = -0.35 - d10_1 - d14_1 - d23_1 - d24_1;
    j[0][1] = d2_2 + d3_2 + d9_2 + d12_2;
    j[0][3] = d2_4 - d23_4; j[0][4] = d3_5; j[0][5] = -d14_6; j[0][9] = d12_10; j[0][10] = d9_11 - d10_11;
    j[0][12] = 0.022; j[0][18] = 5.78 - d24_19; j[0][19] = 3.12;
    j[1][0] = 0.35; j[1][1] = -d2_2 - d3_2 - d9_2 - d12_2; j[1][3] = -d2_4; j[1][4] = -d3_5; j[1][9] = -d12_10; j[1][10] = -d9_11; j[1][18] = 2.1;
    j[2][0] = 0.35; j[2][2] = -4.8e6; j[2][3] = 0.0175; j[2][15] = 4.44e11; j[2][18] = 5.78;
    j[3][0] = -d23_1; j[3][1] = -d2_2; j[3][2] = 4.8e6; j[3][3] = -d2_4 - 3.5e-4 - 0.0175 - d23_4;
    j[4][1] = -d3_2; j[4][4] = -d3_5; j[4][5] = d6_6 + d20_6; j[4][6] = 2 * 8.6e-4 + d6_7; j[4][8] = 1.3e-4; j[4][13] = 1.88; j[4][16] = d20_17;
    j[5][0] = -d14_1; j[5][1] = d3_2; j[5][4] = d3_5; j[5][5] = -d6_6 - d8_6 - d14_6 - d20_6; j[5][6] = -d6_7; j[5][8] = -d8_9;
    j[5][15] = 2e8; j[5][16] = -d20_17;
    j[6][5] = -d6_6; j[6][6] = -8.6e-4 - 8.2e-4 - d6_7; j[6][13] = 1.88;
    j[7][5] = d6_6; j[7][6] = 8.6e-4 + 8.2e-4 + d6_7; j[7][8] = 1.3e-4;
    j[8][5] = -d8_6; j[8][8] = -1.3e-4 - d8_9;
    j[9][1] = d9_2 - d12_2; j[9][8] = 1.3e-4; j[9][9] = -d12_10; j[9][10] = d9_11;
    j[10][0] = -d10_1; j[10][1] = -d9_2; j[10][5] = d8_6; j[10][8] = d8_9; j[10][10] = -d9_11 - d10_11; j[10][12] = 0.022;
    j[11][1] = d9_2; j[11][10] = d9_11;
    j[12][0] = d10_1; j[12][10] = d10_11; j[12][12] = -0.022;
    j[13][1] = d12_2; j[13][9] = d12_10; j[13][13] = -1.88;
    j[14][0] = d14_1; j[14][5] = d14_6;
    j[15][3] = 3.5e-4; j[15][15] = -1e8 - 4.44e11;
    j[16][5] = -d20_6; j[16][16] = -d20_17;
    j[17][5] = d20_6; j[17][16] = d20_17;
    j[18][0] = d23_1 - d24_1; j[18][3] = d23_4; j[18][18] = -2.1 - 5.78 - d24_19; j[18][19] = 3.12;
    j[19][0] = d24_1; j[19][18] = d24_19; j[19][19] = -3.12;
}

/* In the order of the C# side. Through a volatile pointer, so that no call is merged with another or moved out of the loop. */
static function *const rates[] = {
    lorenz63_rates, lotka_volterra_rates, van_der_pol_rates, arenstorf_rates, pleiades_rates,
    robertson_rates, e5_rates, hires_rates, orego_rates, pollution_rates,
};

static function *const jacobians[] = {
    lorenz63_jacobian, lotka_volterra_jacobian, van_der_pol_jacobian, arenstorf_jacobian, pleiades_jacobian,
    robertson_jacobian, e5_jacobian, hires_jacobian, orego_jacobian, pollution_jacobian,
};

void repeat_rates(int problem, int calls, const double *x, const double *p, double *out)
{
    function *volatile f = rates[problem];
    for (int i = 0; i < calls; i++) f(x, p, out);
}

void repeat_jacobian(int problem, int calls, const double *x, const double *p, double *out)
{
    function *volatile f = jacobians[problem];
    for (int i = 0; i < calls; i++) f(x, p, out);
}
