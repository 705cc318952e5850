using System.Globalization;
using PartCheck.OperatingPoints;
using PartCheck.Quantities;
using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>One finding, or several alike, in words.</summary>
internal static class FindingText
{
    /// <summary>Findings that say the same of several references, together: in the order of the first of each.</summary>
    public static IReadOnlyList<IReadOnlyList<Finding>> Grouped(IEnumerable<Finding> findings) =>
        [.. findings.GroupBy(f => f with
        {
            Reference = null,
            References = null,
            Channels = null,
            Missing = [],
            Cell = null,
            Basis = null,
            Derivation = null,
            Text = f.Text + string.Join("|", f.Missing) + string.Join(",", f.References ?? []) + string.Join(",", f.Channels ?? []),
        }).Select(g => (IReadOnlyList<Finding>)[.. g])];

    /// <summary>Findings of one subject that miss the same, their rules together.</summary>
    public static IReadOnlyList<IReadOnlyList<Finding>> GroupedByGap(IEnumerable<Finding> findings) =>
        [.. findings.GroupBy(f => string.Join("|", [f.Channel, f.Pin, f.PartNumber, string.Join(",", f.Channels ?? []), string.Join(",", f.Missing)]))
            .Select(g => (IReadOnlyList<Finding>)[.. g])];

    /// <summary>Whom it concerns: references and part number, pin, or nothing.</summary>
    public static string Subject(IReadOnlyList<Finding> group)
    {
        Finding f = group[0];
        if (f.Pin is not null)
        {
            return f.Pin + " (" + string.Join(", ", f.Channels ?? []) + ")";
        }

        IEnumerable<string> references = f.References ?? group.Select(g => g.Reference).OfType<string>().Distinct(StringComparer.Ordinal);
        string joined = string.Join(", ", references);
        return (joined.Length > 0, f.PartNumber) switch
        {
            (true, { } part) => joined + " " + part,
            (true, null) => joined,
            (false, { } part) => part,
            _ => string.Empty,
        };
    }

    /// <summary>Actual against allowed, e.g. <c>0.31 W of 0.19 W, ratio 1.63</c>.</summary>
    public static string Numbers(Finding f)
    {
        if (f.Actual is not { } actual || f.Allowed is not { } allowed || !double.IsFinite(actual) || !double.IsFinite(allowed))
        {
            return f.Verdict == Verdict.Nonconforming && f.Rule == "drive" ? "the control never conducts enough below the pin level" : string.Empty;
        }

        bool atLeast = f.Rule is "headroom" or "drive" || (f.Rule == "current" && allowed > actual && f.Verdict == Verdict.Nonconforming);
        string ratio = Ratio(f) is { } r ? ", ratio " + r : string.Empty;
        string limit = f.Rule switch
        {
            "headroom" or "drive" => "needs at least",
            "current" => atLeast ? "below" : "against",
            _ => "of",
        };
        return $"{(f.ActualIsAtLeast ? "at least " : string.Empty)}{Value(actual, f.Unit)} {limit} {Value(allowed, f.Unit)}{ratio}";
    }

    /// <summary>
    /// The stress ratio with two decimals, with more where two would show a broken limit as met exactly; null: none.
    /// </summary>
    public static string? Ratio(Finding f) => Ratio(FindingOrder.Ratio(f));

    /// <summary>A stress ratio as every report shows it; null: none.</summary>
    public static string? Ratio(double? stressRatio)
    {
        if (stressRatio is not { } ratio)
        {
            return null;
        }

        string shown = ratio.ToString("0.00", CultureInfo.InvariantCulture);
        return shown == "1.00" && ratio != 1 ? ratio.ToString("0.00####", CultureInfo.InvariantCulture) : shown;
    }

    /// <summary>A value with its unit; temperatures in degrees Celsius; NaN and infinity: not known.</summary>
    public static string Value(double si, string? unit, int digits = 4) => !double.IsFinite(si) ? "not known" : (unit == "K"
        ? string.Create(CultureInfo.InvariantCulture, $"{si - Temperature.CelsiusZero:0.0} degC")
        : EngineeringNotation.Format(si, unit ?? string.Empty, digits)).Replace(' ', Columns80.Glue);

    /// <summary>The worst mix of parts in words, e.g. <c>with OX-9 by Oxmoor in Q1, Q3</c>; empty: no line offers a choice.</summary>
    public static string Mix(Finding f) => f.Mix.Count == 0 ? string.Empty : "with " + string.Join("; ", f.Mix.Select(m =>
        $"{m.PartNumber}{(m.Manufacturer is { } maker ? " by " + maker : string.Empty)} in {string.Join(", ", m.References)}"));

    /// <summary>The concession in words: who accepted it, from when to when, for what, why; empty: there is none.</summary>
    public static string Accepted(Finding f)
    {
        if (f.Concession is not { } granted)
        {
            return string.Empty;
        }

        string holds = granted.Effectivity is { } effectivity ? "for " + effectivity : "serials or lots not named";
        return $"accepted by {granted.AcceptedBy}, {Day(granted.Date)} to {Day(granted.Expires)}, {holds}: {granted.Reason} ({granted.Cell})";
    }

    /// <summary>A day as ISO 8601 writes it.</summary>
    public static string Day(DateOnly day) => day.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    /// <summary>The corner in words.</summary>
    public static string Corner(Finding f)
    {
        if (f.Corner is not { } c)
        {
            return string.Empty;
        }

        List<string> words = [];
        if (f.State == ChannelState.Unfed)
        {
            words.Add("load supply absent");
        }
        else
        {
            words.Add("supply " + Value(c.Supply, "V"));
            words.Add("drop " + Value(c.LoadDrop, "V"));
        }

        words.Add("ambient " + Value(c.Ambient, "K"));
        words.Add("pin " + Value(c.PinLevel, "V") + (c.PinResistance > 0 ? " behind " + Value(c.PinResistance, "ohm") : string.Empty));
        words.Add(f.State == ChannelState.Off ? "pin low" : c.Heat == 0 ? "cold start" : "self-heated");
        if (c.NeighboursOn == true)
        {
            words.Add("elements of other channels on");
        }

        Add(words, "control", c.Control);
        Add(words, c.OddLeg is null ? "pass" : "pass of the rest", c.Pass);
        Add(words, "sense" + (c.OddLeg is null ? string.Empty : " of the rest"), c.Sense);
        Add(words, "averaging" + (c.OddLeg is null ? string.Empty : " of the rest"), c.Averaging);
        if (c.OddLeg is not null)
        {
            Add(words, "odd leg's pass", c.OddPass);
            Add(words, "odd leg's sense", c.OddSense);
            Add(words, "odd leg's averaging", c.OddAveraging);
        }

        Add(words, "feed", c.Feed);
        Add(words, "pull-down", c.PullDown);
        return "at " + string.Join(", ", words);
    }

    private static void Add(List<string> words, string what, TransistorCorner corner)
    {
        List<string> ends = [];
        if (corner.Vbe != Extreme.Typical)
        {
            ends.Add("VBE " + End(corner.Vbe));
        }

        if (corner.Hfe != Extreme.Typical)
        {
            ends.Add("hFE " + End(corner.Hfe));
        }

        if (ends.Count > 0)
        {
            words.Add(what + " " + string.Join(" ", ends));
        }
    }

    private static void Add(List<string> words, string what, Extreme end)
    {
        if (end != Extreme.Typical)
        {
            words.Add(what + " " + End(end));
        }
    }

    private static string End(Extreme end) => end switch { Extreme.Min => "min", Extreme.Match => "one lot's match off the rest", Extreme.Inside => "inside its range", _ => "max" };
}
