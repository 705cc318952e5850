namespace PartCheck.Devices;

/// <summary>
/// The factor on the forward base current that moves a model's gain to a table's guaranteed gain:
/// f(IC) = model hFE(IC) / table hFE(IC), both at 25 degC and the table's VCE. Kept as a cubic Hermite in ln IC, held
/// constant outside its grid.
/// </summary>
public sealed class GainFactor
{
    private readonly double firstLog;
    private readonly double step;
    private readonly double[] values;
    private readonly double[] slopes;

    private GainFactor(double firstLog, double step, double[] values, double[] slopes)
    {
        this.firstLog = firstLog;
        this.step = step;
        this.values = values;
        this.slopes = slopes;
    }

    /// <summary>The same factor at any current (0: no base current, the bound where no largest gain is given).</summary>
    public static GainFactor Constant(double value) => new(0, 1, [value, value], [0, 0]);

    /// <summary>Tabulates a factor.</summary>
    /// <param name="factor">f as a function of IC [A].</param>
    /// <param name="from">Smallest current of the grid [A].</param>
    /// <param name="to">Largest current of the grid [A].</param>
    /// <param name="count">Grid points, at least 2.</param>
    public static GainFactor Tabulate(Func<double, double> factor, double from, double to, int count)
    {
        ArgumentNullException.ThrowIfNull(factor);
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 2);
        double first = Math.Log(from);
        double step = (Math.Log(to) - first) / (count - 1);
        double[] values = [.. Enumerable.Range(0, count).Select(i => factor(Math.Exp(first + (i * step))))];
        double[] slopes = new double[count];
        for (int i = 0; i < count; i++)
        {
            // Limited central slope: monotone between grid points, so a kink of the table makes no overshoot.
            double left = i > 0 ? values[i] - values[i - 1] : 0;
            double right = i < count - 1 ? values[i + 1] - values[i] : 0;
            slopes[i] = left * right <= 0 ? 0 : 2 * left * right / (left + right);
        }

        return new GainFactor(first, step, values, slopes);
    }

    /// <summary>The factor straight between two, so that the base current is; null: 1.</summary>
    /// <param name="low">Factor at share 0.</param>
    /// <param name="high">Factor at share 1.</param>
    /// <param name="share">0 to 1.</param>
    /// <exception cref="ArgumentException">Both vary with the current and are tabulated on different grids.</exception>
    public static GainFactor? Between(GainFactor? low, GainFactor? high, double share)
    {
        if (ReferenceEquals(low, high) || share is 0 or 1)
        {
            return share == 1 ? high : low;
        }

        GainFactor a = low ?? Constant(1);
        GainFactor b = high ?? Constant(1);
        GainFactor grid = a.values.Length >= b.values.Length ? a : b;
        double[] Spread(GainFactor of, double[] values, bool slopes) =>
            of.values.Length == grid.values.Length && of.firstLog == grid.firstLog && of.step == grid.step ? values
            : of.slopes.All(s => s == 0) && of.values.All(v => v == of.values[0]) ? [.. Enumerable.Repeat(slopes ? 0 : of.values[0], grid.values.Length)]
            : throw new ArgumentException("The two factors stand on different grids.", nameof(high));
        double[] Mix(double[] x, double[] y) => [.. x.Zip(y, (p, q) => ((1 - share) * p) + (share * q))];
        return new GainFactor(
            grid.firstLog, grid.step, Mix(Spread(a, a.values, false), Spread(b, b.values, false)), Mix(Spread(a, a.slopes, true), Spread(b, b.slopes, true)));
    }

    /// <summary>ln of the grid's smallest current [ln A].</summary>
    internal double FirstLog => firstLog;

    /// <summary>Grid points for each unit of ln IC.</summary>
    internal double PointsPerLog => 1 / step;

    /// <summary>The cubics between the grid points, in the share t of the way: c0 + c1 t + c2 t^2 + c3 t^3, four numbers a cell.</summary>
    internal double[] Cubics()
    {
        double[] cubics = new double[4 * (values.Length - 1)];
        for (int i = 0; i < values.Length - 1; i++)
        {
            cubics[4 * i] = values[i];
            cubics[(4 * i) + 1] = slopes[i];
            cubics[(4 * i) + 2] = (3 * (values[i + 1] - values[i])) - (2 * slopes[i]) - slopes[i + 1];
            cubics[(4 * i) + 3] = (2 * (values[i] - values[i + 1])) + slopes[i] + slopes[i + 1];
        }

        return cubics;
    }

    /// <summary>The factor and its slope at a collector current.</summary>
    /// <param name="ic">Collector current [A].</param>
    /// <param name="slope">df/dIC [1/A].</param>
    public double At(double ic, out double slope)
    {
        slope = 0;
        if (!(ic > 0))
        {
            return values[0];
        }

        double position = (Math.Log(ic) - firstLog) / step;
        if (position <= 0)
        {
            return values[0];
        }

        if (position >= values.Length - 1)
        {
            return values[^1];
        }

        int i = (int)position;
        double t = position - i;
        double a = values[i];
        double b = values[i + 1];
        double da = slopes[i];
        double db = slopes[i + 1];
        double c2 = (3 * (b - a)) - (2 * da) - db;
        double c3 = (2 * (a - b)) + da + db;
        slope = (da + (t * ((2 * c2) + (3 * c3 * t)))) / (step * ic);
        return a + (t * (da + (t * (c2 + (c3 * t)))));
    }
}
