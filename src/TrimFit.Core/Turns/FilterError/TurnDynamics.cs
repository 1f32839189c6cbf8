namespace TrimFit.Core.Turns.FilterError;

/// <summary>The turn model over one step with inputs held: transition, effect of the input, and covariance of the noise that entered.</summary>
/// <remarks>States r, p, w, psi (turn rate, its slope, slow disturbance, heading); the coloured heading error g is apart and scalar. Exact:
/// Φ(h) = exp(Ah), Γ(h) = ∫Φ(s)B ds and Q(h) = ∫Φ(s)DΦ(s)' ds are summed as power series on a step short against every time constant and
/// doubled back, Φ(2h) = Φ(h)², Γ(2h) = Φ(h)Γ(h) + Γ(h), Q(2h) = Q(h) + Φ(h)Q(h)Φ(h)' (Van Loan 1978, "Computing integrals involving the
/// matrix exponential", IEEE Trans. Automatic Control 23:395, doi 10.1109/TAC.1978.1101743, gets the same from one larger exponential).
/// The tests compare with that.</remarks>
internal struct TurnDynamics
{
    private const int Terms = 12; // (1/4)^13/13! is below 1e-17, and the series starts at a norm of 1/4

    public double Rr, Rp, Rw, Pr, Pp, Pw, Ww, Sr, Sp, Sw, Gg;
    public double Gr, Gp, Gs;
    public double Q00, Q01, Q02, Q03, Q11, Q12, Q13, Q22, Q23, Q33, Q44;

    public static TurnDynamics Over(double dt, NoiseParameters noise)
    {
        Span<double> a = stackalloc double[16];
        Span<double> b = stackalloc double[4];
        a.Clear();
        b.Clear();
        if (noise.Order == ResponseOrder.First)
        {
            a[0] = -1 / noise.LagSec;
            a[2] = 1 / noise.LagSec;
            b[0] = 1 / noise.LagSec;
        }
        else
        {
            double wn2 = noise.NaturalFrequency * noise.NaturalFrequency;
            a[1] = 1;
            a[4] = -wn2;
            a[5] = -2 * noise.Damping * noise.NaturalFrequency;
            a[6] = wn2;
            b[1] = wn2;
        }
        a[10] = -1 / noise.DisturbanceTauSec;
        a[12] = 1;
        double quick = noise.QuickDisturbance * (noise.Order == ResponseOrder.First ? b[0] : b[1]);
        int driven = noise.Order == ResponseOrder.First ? 0 : 5;
        double d22 = 2 * noise.DisturbanceRms * noise.DisturbanceRms / noise.DisturbanceTauSec;

        double norm = 0;
        for (int i = 0; i < 4; i++)
            norm = Math.Max(norm, Math.Abs(a[4 * i]) + Math.Abs(a[(4 * i) + 1]) + Math.Abs(a[(4 * i) + 2]));
        int doublings = Math.Max(0, (int)Math.Ceiling(Math.Log2(Math.Max(norm * dt, 1e-9) * 4)));
        double h = Math.ScaleB(dt, -doublings);

        Span<double> phi = stackalloc double[16];
        Span<double> gamma = stackalloc double[4];
        Span<double> q = stackalloc double[16];
        Span<double> power = stackalloc double[16]; // A^k h^k/k!
        Span<double> density = stackalloc double[16]; // k-th derivative of Φ D Φ' at 0, times h^(k+1)/(k+1)!
        Span<double> next = stackalloc double[16];
        Span<double> half = stackalloc double[16];
        Span<double> g = stackalloc double[4];
        phi.Clear();
        gamma.Clear();
        q.Clear();
        power.Clear();
        density.Clear();
        for (int i = 0; i < 4; i++)
            phi[5 * i] = power[5 * i] = 1;
        density[10] = d22 * h;
        density[driven] = quick * quick * h;
        density.CopyTo(q);
        for (int i = 0; i < 4; i++)
            gamma[i] = h * b[i];
        for (int k = 1; k <= Terms; k++)
        {
            Multiply(a, power, next);
            for (int i = 0; i < 16; i++)
            {
                power[i] = next[i] * h / k;
                phi[i] += power[i];
            }
            for (int i = 0; i < 4; i++)
            {
                double sum = 0;
                for (int j = 0; j < 4; j++)
                    sum += power[(4 * i) + j] * b[j];
                gamma[i] += sum * h / (k + 1);
            }
            Multiply(a, density, next);
            for (int i = 0; i < 4; i++)
            {
                for (int j = 0; j < 4; j++)
                    half[(4 * i) + j] = (next[(4 * i) + j] + next[(4 * j) + i]) * h / (k + 1);
            }
            half.CopyTo(density);
            for (int i = 0; i < 16; i++)
                q[i] += density[i];
        }
        for (int s = 0; s < doublings; s++)
        {
            Multiply(phi, q, half);
            for (int i = 0; i < 4; i++)
            {
                for (int j = 0; j < 4; j++)
                {
                    double sum = q[(4 * i) + j];
                    for (int l = 0; l < 4; l++)
                        sum += half[(4 * i) + l] * phi[(4 * j) + l];
                    next[(4 * i) + j] = sum;
                }
            }
            next.CopyTo(q);
            for (int i = 0; i < 4; i++)
            {
                g[i] = gamma[i];
                for (int j = 0; j < 4; j++)
                    g[i] += phi[(4 * i) + j] * gamma[j];
            }
            g.CopyTo(gamma);
            Multiply(phi, phi, next);
            next.CopyTo(phi);
        }
        double gg = Math.Exp(-dt / noise.GustTauSec);
        return new()
        {
            Rr = phi[0],
            Rp = phi[1],
            Rw = phi[2],
            Pr = phi[4],
            Pp = phi[5],
            Pw = phi[6],
            Ww = phi[10],
            Sr = phi[12],
            Sp = phi[13],
            Sw = phi[14],
            Gg = gg,
            Gr = gamma[0],
            Gp = gamma[1],
            Gs = gamma[3],
            Q00 = q[0],
            Q01 = q[1],
            Q02 = q[2],
            Q03 = q[3],
            Q11 = q[5],
            Q12 = q[6],
            Q13 = q[7],
            Q22 = q[10],
            Q23 = q[11],
            Q33 = q[15],
            Q44 = noise.GustRms * noise.GustRms * (1 - (gg * gg)),
        };
    }

    private static void Multiply(ReadOnlySpan<double> x, ReadOnlySpan<double> y, Span<double> product)
    {
        for (int i = 0; i < 4; i++)
        {
            for (int j = 0; j < 4; j++)
            {
                double sum = 0;
                for (int k = 0; k < 4; k++)
                    sum += x[(4 * i) + k] * y[(4 * k) + j];
                product[(4 * i) + j] = sum;
            }
        }
    }
}
