using PartCheck.Quantities;

namespace PartCheck.Devices;

/// <summary>
/// A device from datasheet points, where no model card is given: BR = NR = 1, RB = RC = RE = 0, NE = 1.5, EG 1.11, XTI 3,
/// TNOM 25 degC; BF, ISE and IKF by least squares on ln hFE over three or more gain points, fewer: BF alone; IS from one
/// base-emitter voltage.
/// </summary>
public static class DatasheetFit
{
    private const double LeakageEmission = 1.5;

    /// <summary>Fits a device.</summary>
    /// <param name="gains">Collector current [A] and nominal gain [-] of each point; empty: hFE 100.</param>
    /// <param name="vbe">Base-emitter voltage [V] at <paramref name="vbeAt"/>.</param>
    /// <param name="vbeAt">Collector current [A].</param>
    /// <param name="vbeVce">Collector-emitter voltage of that point [V].</param>
    /// <param name="vaf">Early voltage [V]; infinity: none.</param>
    public static BipolarParameters Fit(
        IReadOnlyList<(double Ic, double Gain)> gains, double vbe, double vbeAt, double vbeVce, double vaf)
    {
        ArgumentNullException.ThrowIfNull(gains);
        double mean = gains.Count == 0 ? 100 : Math.Exp(gains.Average(g => Math.Log(g.Gain)));
        BipolarParameters shape = new()
        {
            Is = 1e-14,
            Bf = mean,
            Vaf = vaf,
            Ne = LeakageEmission,
            Tnom = PhysicalConstants.RoomTemperature,
        };
        if (gains.Count >= 3)
        {
            shape = FitGain(shape, gains, mean);
        }

        // IS moves VBE alone (ISE moves with it), so the voltage is met by one shift and a polish.
        double logShift = 0;
        double vt = PhysicalConstants.ThermalVoltage(PhysicalConstants.RoomTemperature);
        for (int i = 0; i < 6; i++)
        {
            double now = DatasheetPoint.Solve(new BipolarDevice(shape, Math.Exp(logShift)), vbeAt, vbeVce).Vbe;
            logShift += (now - vbe) / vt;
        }

        double k = Math.Exp(logShift);
        return shape with { Is = shape.Is * k, Ise = shape.Ise * Math.Pow(k, 1 / LeakageEmission) };
    }

    /// <summary>
    /// 1/hFE = qb (1/BF + c u^(1/NE - 1)), u = IC qb the ideal current, qb from IKF, c = ISE/IS^(1/NE); Gauss-Newton with
    /// damping on (ln BF, ln c, ln IKF), each kept inside bounds far outside any real part.
    /// </summary>
    private static BipolarParameters FitGain(
        BipolarParameters shape, IReadOnlyList<(double Ic, double Gain)> gains, double mean)
    {
        double lowest = gains.Min(g => g.Ic);
        double highest = gains.Max(g => g.Ic);
        double[] at = [Math.Log(mean * 1.3), Math.Log(0.3 / mean * Math.Pow(lowest, 1 - (1 / LeakageEmission))), Math.Log(highest * 3)];
        double[] low = [Math.Log(mean / 3), at[1] - 12, Math.Log(highest / 10)];
        double[] high = [Math.Log(mean * 20), at[1] + 5, Math.Log(highest * 1e4)];
        double damping = 1e-2;
        double error = SquaredError(at, gains);
        for (int round = 0; round < 200; round++)
        {
            double[] normal = new double[9];
            double[] right = new double[3];
            foreach ((double ic, double gain) in gains)
            {
                double here = LogGain(at, ic);
                double[] slope = new double[3];
                for (int j = 0; j < 3; j++)
                {
                    double[] moved = [.. at];
                    moved[j] += 1e-5;
                    slope[j] = (LogGain(moved, ic) - here) / 1e-5;
                }

                for (int j = 0; j < 3; j++)
                {
                    right[j] += slope[j] * (Math.Log(gain) - here);
                    for (int k = 0; k < 3; k++)
                    {
                        normal[(3 * j) + k] += slope[j] * slope[k];
                    }
                }
            }

            for (int j = 0; j < 3; j++)
            {
                normal[4 * j] += damping * (normal[4 * j] + 1e-6);
            }

            if (!SolveThree(normal, right))
            {
                break;
            }

            double[] next = [.. at.Select((a, j) => Math.Clamp(a + right[j], low[j], high[j]))];
            double nextError = SquaredError(next, gains);
            if (nextError < error)
            {
                at = next;
                damping = Math.Max(damping / 5, 1e-9);
                bool done = error - nextError < 1e-14;
                error = nextError;
                if (done)
                {
                    break;
                }
            }
            else
            {
                damping *= 10;
                if (damping > 1e9)
                {
                    break;
                }
            }
        }

        return shape with
        {
            Bf = Math.Exp(at[0]),
            Ise = Math.Exp(at[1]) * Math.Pow(shape.Is, 1 / LeakageEmission),
            Ikf = Math.Exp(at[2]),
        };
    }

    private static double SquaredError(double[] at, IReadOnlyList<(double Ic, double Gain)> gains) =>
        gains.Sum(g => Math.Pow(LogGain(at, g.Ic) - Math.Log(g.Gain), 2));

    private static double LogGain(double[] at, double ic)
    {
        double ikf = Math.Exp(at[2]);

        // u/qb = ic with qb = (1 + sqrt(1 + 4u/IKF))/2 gives u = ic (1 + ic/IKF).
        double qb = 1 + (ic / ikf);
        double u = ic * qb;
        return -Math.Log(qb * (Math.Exp(-at[0]) + Math.Exp(at[1] + (((1 / LeakageEmission) - 1) * Math.Log(u)))));
    }

    /// <summary>Three linear equations by Cramer's rule; false where they are singular.</summary>
    private static bool SolveThree(double[] m, double[] r)
    {
        double Det(double a, double b, double c, double d, double e, double f, double g, double h, double i) =>
            (a * ((e * i) - (f * h))) - (b * ((d * i) - (f * g))) + (c * ((d * h) - (e * g)));
        double det = Det(m[0], m[1], m[2], m[3], m[4], m[5], m[6], m[7], m[8]);
        if (!(Math.Abs(det) > 0))
        {
            return false;
        }

        double x = Det(r[0], m[1], m[2], r[1], m[4], m[5], r[2], m[7], m[8]) / det;
        double y = Det(m[0], r[0], m[2], m[3], r[1], m[5], m[6], r[2], m[8]) / det;
        double z = Det(m[0], m[1], r[0], m[3], m[4], r[1], m[6], m[7], r[2]) / det;
        (r[0], r[1], r[2]) = (x, y, z);
        return double.IsFinite(x) && double.IsFinite(y) && double.IsFinite(z);
    }
}
