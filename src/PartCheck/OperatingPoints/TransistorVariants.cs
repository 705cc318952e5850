using System.Globalization;
using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.OperatingPoints;

/// <summary>The devices that one transistor's row stands for: the nominal one and one for each pair of window ends.</summary>
public sealed class TransistorVariants
{
    private const double AssumedHalfWindow = 0.05;
    private const double AssumedWideHalfWindow = 0.1;
    private const double AssumedTest = 0.010;
    private const double ColdExponent = 3.4;
    private const double HotExponent = 1.5;
    private readonly BipolarDevice[] corners = new BipolarDevice[4];
    private readonly BipolarDevice[] matched = new BipolarDevice[4];
    private readonly List<Assumption> assumed = [];

    /// <summary>Builds the devices of a row.</summary>
    /// <param name="part">The transistor.</param>
    public TransistorVariants(Transistor part)
    {
        ArgumentNullException.ThrowIfNull(part);
        Part = part;
        MinPoints = Points(part, p => p.Min);
        MaxPoints = Points(part, p => p.Max);
        BipolarParameters model = part.Card?.Value.Parameters ?? FromPoints(part);
        if (part.Card is { } card)
        {
            foreach (string what in card.Value.Assumed)
            {
                Assume("model card " + card.Value.Name, what);
            }
        }

        (double min, double typ, double max, double at, double vce) = VbeWindow(part, model);
        double hfeVce = part.HfeVce.Volts;
        BipolarDevice untouched = new(model);
        Func<double, double> modelGain = ic => DatasheetPoint.Solve(untouched, ic, hfeVce).Gain;
        GainFactor? lowGain = MinPoints.Count == 0 ? null : Factor(modelGain, MinPoints);
        GainFactor? highGain = MaxPoints.Count == 0 ? null : Factor(modelGain, MaxPoints);
        if (MinPoints.Count == 0 && part.Card is null)
        {
            Assume("hFE", "100");
        }

        if (MaxPoints.Count == 0)
        {
            Assume("hFE maximum", "base current 0 as the bound");
            highGain = GainFactor.Constant(0);
        }

        if (part.Card is null && part.Hfe?.Value.Any(p => p.Min is not null && p.Max is null) == true)
        {
            Assume("nominal hFE", "2 x the minimum where no maximum is given");
        }

        (double minCold, double minHot, double maxCold, double maxHot) = GainExponents(part, model);
        for (int v = 0; v < 2; v++)
        {
            for (int h = 0; h < 2; h++)
            {
                GainFactor? gain = h == 0 ? lowGain : highGain;
                double end = v == 0 ? min : max;
                corners[(2 * v) + h] = Shifted(model, gain, end, at, vce, h == 0 ? minCold : maxCold, h == 0 ? minHot : maxHot);
                if (part.VbeMatch is { } match)
                {
                    double inside = Math.Clamp(v == 0 ? end + match.Value.Volts : end - match.Value.Volts, min, max);
                    matched[(2 * v) + h] = Shifted(model, gain, inside, at, vce, h == 0 ? minCold : maxCold, h == 0 ? minHot : maxHot);
                }
            }
        }

        Nominal = part.Card is not null
            ? untouched
            : Shifted(model, MinPoints.Count == 0 ? null : Factor(modelGain, NominalPoints(part)), typ, at, vce, model.Xtb, model.Xtb);
        VbeVaries = max > min;
        GainVaries = MaxPoints.Count == 0 || MinPoints.Count == 0 || !MinPoints.SequenceEqual(MaxPoints);
        CardFault = part.Card is null ? null : FaultOfCard(part, untouched);
    }

    /// <summary>The row.</summary>
    public Transistor Part { get; }

    /// <summary>The nominal device.</summary>
    public BipolarDevice Nominal { get; }

    /// <summary>False where the VBE window has no width.</summary>
    public bool VbeVaries { get; }

    /// <summary>False where the gain window has no width.</summary>
    public bool GainVaries { get; }

    /// <summary>Current and smallest gain of each guaranteed point, rising in current.</summary>
    public IReadOnlyList<(double Ic, double Gain)> MinPoints { get; }

    /// <summary>Current and largest gain of each guaranteed point, rising in current.</summary>
    public IReadOnlyList<(double Ic, double Gain)> MaxPoints { get; }

    /// <summary>What was assumed.</summary>
    public IReadOnlyList<Assumption> Assumed => assumed;

    /// <summary>Why the model card cannot be this part's; null: it can, or there is none.</summary>
    public string? CardFault { get; }

    /// <summary>The device at the ends of its windows (<see cref="Extreme.Typical"/>: a window without width).</summary>
    public BipolarDevice At(TransistorCorner corner) =>
        corners[(corner.Vbe == Extreme.Max ? 2 : 0) + (corner.Hfe == Extreme.Max ? 1 : 0)];

    /// <summary>The device one lot's match inside an end of the VBE window.</summary>
    /// <param name="restVbe">The end that the rest takes.</param>
    /// <param name="hfe">End of the gain window.</param>
    /// <exception cref="InvalidOperationException">The row gives no match.</exception>
    public BipolarDevice Matched(Extreme restVbe, Extreme hfe) =>
        matched[(restVbe == Extreme.Max ? 2 : 0) + (hfe == Extreme.Max ? 1 : 0)]
        ?? throw new InvalidOperationException($"{Part.PartNumber} has no VBE match.");

    /// <summary>The device at positions inside its windows, 0 their smallest and 1 their largest VBE and hFE.</summary>
    public BipolarDevice Between(double vbe, double hfe) => Blend(corners, vbe, hfe);

    /// <summary>The odd device of one lot, the rest at a position inside its VBE window: at most the match away from it.</summary>
    /// <exception cref="InvalidOperationException">The row gives no match.</exception>
    public BipolarDevice MatchedBetween(double restVbe, double hfe)
    {
        Matched(Extreme.Min, Extreme.Min);
        return Blend(matched, restVbe, hfe);
    }

    /// <summary>True where a collector current lies within a factor 3 of the guaranteed points of the window's end.</summary>
    public bool GainHolds(double ic, Extreme hfe)
    {
        IReadOnlyList<(double Ic, double Gain)> points = hfe == Extreme.Max ? MaxPoints : MinPoints;
        return points.Count == 0 || (ic >= points[0].Ic / 3 && ic <= points[^1].Ic * 3);
    }

    private static BipolarDevice Shifted(
        BipolarParameters model, GainFactor? gain, double vbe, double at, double vce, double xtbCold, double xtbHot)
    {
        double logShift = 0;
        double scale = model.Nf * PhysicalConstants.ThermalVoltage(PhysicalConstants.RoomTemperature);
        for (int i = 0; i < 4; i++)
        {
            BipolarDevice device = new(model, Math.Exp(logShift), gain, xtbCold, xtbHot);
            logShift += (DatasheetPoint.Solve(device, at, vce).Vbe - vbe) / scale;
        }

        return new BipolarDevice(model, Math.Exp(logShift), gain, xtbCold, xtbHot);
    }

    /// <summary>Bilinear between four devices: the shift in its logarithm, the gain factor and its exponents straight.</summary>
    private static BipolarDevice Blend(BipolarDevice[] ends, double vbe, double hfe)
    {
        double Mix(Func<BipolarDevice, double> of) =>
            ((1 - vbe) * (((1 - hfe) * of(ends[0])) + (hfe * of(ends[1])))) + (vbe * (((1 - hfe) * of(ends[2])) + (hfe * of(ends[3]))));
        return new BipolarDevice(
            ends[0].Parameters, Math.Exp(Mix(d => Math.Log(d.Shift))), GainFactor.Between(ends[0].Gain, ends[1].Gain, hfe), Mix(d => d.XtbCold), Mix(d => d.XtbHot));
    }

    private static List<(double Ic, double Gain)> Points(Transistor part, Func<HfePoint, double?> end) =>
        [.. (part.Hfe?.Value ?? []).Where(p => end(p) is not null).Select(p => (p.At.Amperes, end(p)!.Value)).OrderBy(p => p.Amperes)];

    /// <summary>sqrt(min max) where both are given, else twice the minimum.</summary>
    private static List<(double Ic, double Gain)> NominalPoints(Transistor part) =>
        [.. (part.Hfe?.Value ?? [])
            .Where(p => p.Min is not null)
            .Select(p => (p.At.Amperes, p.Max is { } max ? Math.Sqrt(p.Min!.Value * max) : 2 * p.Min!.Value))
            .OrderBy(p => p.Amperes)];

    private static GainFactor Factor(Func<double, double> modelGain, IReadOnlyList<(double Ic, double Gain)> table) =>
        GainFactor.Tabulate(ic => modelGain(ic) / LogInterpolated(table, ic), 1e-7, 2, 220);

    /// <summary>Log-log between the points, the outermost value outside.</summary>
    private static double LogInterpolated(IReadOnlyList<(double Ic, double Gain)> table, double ic)
    {
        if (ic <= table[0].Ic)
        {
            return table[0].Gain;
        }

        for (int i = 1; i < table.Count; i++)
        {
            if (ic <= table[i].Ic)
            {
                double share = Math.Log(ic / table[i - 1].Ic) / Math.Log(table[i].Ic / table[i - 1].Ic);
                return table[i - 1].Gain * Math.Pow(table[i].Gain / table[i - 1].Gain, share);
            }
        }

        return table[^1].Gain;
    }

    private static string Volts(double min, double max, double at) => string.Create(
        CultureInfo.InvariantCulture, $"{min:0.000}..{max:0.000} V at {at * 1e3:0.###} mA");

    private static BipolarParameters FromPoints(Transistor part)
    {
        VbeWindow? w = part.Vbe?.Value;
        double typ = w?.Typ?.Volts ?? (w is { Min: { } a, Max: { } b } ? (a.Volts + b.Volts) / 2
            : w?.Max is { } max ? max.Volts - AssumedHalfWindow
            : w?.Min is { } min ? min.Volts + AssumedHalfWindow : 0.65);
        return DatasheetFit.Fit(
            NominalPoints(part), typ, w?.At.Amperes ?? AssumedTest, w?.Vce.Volts ?? 5,
            part.Vaf?.Value.Volts ?? double.PositiveInfinity);
    }

    private (double Min, double Typ, double Max, double At, double Vce) VbeWindow(Transistor part, BipolarParameters model)
    {
        VbeWindow? w = part.Vbe?.Value;
        double at = w?.At.Amperes ?? AssumedTest;
        double vce = w?.Vce.Volts ?? 5;
        double ofModel = DatasheetPoint.Solve(new BipolarDevice(model), at, vce).Vbe;
        double typ = w?.Typ?.Volts ?? (w is { Min: { } a, Max: { } b } ? (a.Volts + b.Volts) / 2 : ofModel);
        double half = w is null && part.Card is null ? AssumedWideHalfWindow : AssumedHalfWindow;
        double min = w?.Min?.Volts ?? typ - half;
        double max = w?.Max?.Volts ?? typ + half;
        if (w?.Min is null || w.Max is null)
        {
            Assume("VBE window", Volts(min, max, at));
        }

        return (min, typ, max, at, vce);
    }

    private (double MinCold, double MinHot, double MaxCold, double MaxHot) GainExponents(Transistor part, BipolarParameters model)
    {
        double? card = model.Xtb > 0 ? model.Xtb : null;
        double? cold = null;
        if (part.HfeCold?.Value is { } c && MinPoints.Count > 0)
        {
            double warm = LogInterpolated(MinPoints, c.At.Amperes);
            cold = Math.Log(c.Min / warm) / Math.Log(c.Temperature.Kelvins / PhysicalConstants.RoomTemperature);
        }

        if (card is null)
        {
            Assume("hFE against temperature", (cold is null ? "minimum x (T/298 K)^3.4 below 25 degC, " : "minimum ")
                + "unchanged above; maximum unchanged below, x (T/298 K)^1.5 above");
        }

        return (cold ?? card ?? ColdExponent, card ?? 0, card ?? 0, card ?? HotExponent);
    }

    private void Assume(string what, string value) => assumed.Add(new Assumption(what, Part.PartNumber, value));

    /// <summary>The datasheet's windows judge the card; where there is none, bounds that no small transistor leaves.</summary>
    private static string? FaultOfCard(Transistor part, BipolarDevice card)
    {
        List<string> faults = [];
        string F(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
        void Hold(string what, double value, double? min, double? max)
        {
            if (value < min || value > max)
            {
                faults.Add(F($"{what} is {value:0.###}, the part's window is {min?.ToString("0.###", CultureInfo.InvariantCulture) ?? "open"}..{max?.ToString("0.###", CultureInfo.InvariantCulture) ?? "open"}"));
            }
        }

        if (part.Vbe?.Value is { } w && (w.Min is not null || w.Max is not null))
        {
            Hold(F($"VBE at {w.At.Amperes * 1e3:0.###} mA in V"), DatasheetPoint.Solve(card, w.At.Amperes, w.Vce.Volts).Vbe, w.Min?.Volts, w.Max?.Volts);
        }
        else
        {
            Hold("VBE at 10 mA in V", DatasheetPoint.Solve(card, AssumedTest, 5).Vbe, 0.55, 0.85);
        }

        if (part.Hfe is { } hfe)
        {
            foreach (HfePoint p in hfe.Value)
            {
                Hold(F($"hFE at {p.At.Amperes * 1e3:0.###} mA"), DatasheetPoint.Solve(card, p.At.Amperes, part.HfeVce.Volts).Gain, p.Min, p.Max);
            }
        }
        else
        {
            Hold("hFE at 10 mA", DatasheetPoint.Solve(card, AssumedTest, 5).Gain, 10, 1500);
        }

        if (card.Parameters.Vaf <= 5)
        {
            faults.Add(F($"VAF is {card.Parameters.Vaf:0.###} V, not above 5 V"));
        }

        return faults.Count == 0 ? null : string.Join("; ", faults);
    }
}
