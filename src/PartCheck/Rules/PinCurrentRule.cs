using System.Globalization;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Current out of a logic pin, states on and unfed, the highest of each feed on the pin added up. Allowed: pin rating x factor [A].
/// </summary>
public static class PinCurrentRule
{
    /// <summary>Identifier.</summary>
    public const string Id = "pin-current";

    /// <summary>What the rule demands, one line.</summary>
    public const string Title = "Current out of a logic pin at most its derated rating, all its feeds together";

    /// <summary>Where the rule comes from.</summary>
    public const string Source = "rated output current of the logic pin";

    /// <summary>Judges one pin.</summary>
    /// <param name="pin">The pin's name.</param>
    /// <param name="feeds">Channels on the pin with the highest current of each.</param>
    /// <param name="logic">The pin's row.</param>
    /// <param name="derating">Derating table.</param>
    public static Finding Judge(string pin, IReadOnlyList<PinFeed> feeds, LogicPin logic, DeratingTable derating)
    {
        ArgumentNullException.ThrowIfNull(feeds);
        ArgumentNullException.ThrowIfNull(logic);
        ArgumentNullException.ThrowIfNull(derating);
        DeratingRow row = derating.For(Id);
        List<string> missing = [];
        if (logic.PinCurrentMax is null)
        {
            missing.Add("Pin current max of " + logic.Name);
        }

        missing.AddRange(feeds.Where(f => double.IsNaN(f.Current)).Select(f => "pin current of " + f.Channel));
        double known = feeds.Where(f => !double.IsNaN(f.Current)).Sum(f => f.Current);
        Stress stress = logic.PinCurrentMax is { } rating
            ? Stress.AtMostOf(known, rating.Value.Amperes * row.Factor)
            : Stress.NotVerified(missing[0]);
        bool verified = missing.Count == 0 || stress.Verdict == Verdict.Nonconforming;
        return new Finding
        {
            Rule = Id,
            Pin = pin,
            Channels = [.. feeds.Select(f => f.Channel)],
            PartNumber = logic.Name,
            State = null,
            Actual = known,
            Allowed = double.IsFinite(stress.Allowed) ? stress.Allowed : null,
            Unit = "A",
            StressRatio = verified ? stress.Ratio : null,
            Verdict = verified ? stress.Verdict : Verdict.NotVerified,
            Source = row.Source,
            Cell = logic.PinCurrentMax?.Cell ?? logic.Cell,
            Missing = verified ? [] : missing,
            Derivation = Derive(feeds, logic, row, stress),
        };
    }

    private static Derivation Derive(IReadOnlyList<PinFeed> feeds, LogicPin logic, DeratingRow row, in Stress stress)
    {
        Derivation steps = new();
        List<string> currents = [];
        for (int i = 0; i < feeds.Count; i++)
        {
            if (double.IsNaN(feeds[i].Current))
            {
                steps.Note($"The pin current of {feeds[i].Channel} is not known.");
                continue;
            }

            string n = feeds.Count == 1 ? string.Empty : (i + 1).ToString(CultureInfo.InvariantCulture);
            DeriveFeed(steps, feeds[i], n);
            currents.Add("Ipin" + n);
        }

        steps.Step("Ipins", currents.Count == 0 ? "0 A" : string.Join(" + ", currents), "A", "all feeds of the pin together");
        if (logic.PinCurrentMax is { } rating)
        {
            steps.Given("Ipinmax", rating.Value.Amperes, "A", "Pin current max of " + logic.Name, rating.Cell).Factor(row)
                .Step("Iallowed", "Ipinmax x F", "A", "derated rating").AtMost("Ipins", "Iallowed", stress);
        }

        return steps;
    }

    private static void DeriveFeed(Derivation steps, PinFeed feed, string n)
    {
        if (feed.State is not { } state || feed.Reading is not { } channel)
        {
            steps.Given("Ipin" + n, feed.Current, "A", $"highest pin current of {feed.Channel}");
            return;
        }

        string name = state.State == ChannelState.Unfed ? "load supply absent" : "on";
        ResistorPoint resistor = state.Resistors.First(r => r.Role == Role.Feed);
        string rf = "Rf" + n;
        steps.Given("Vpin" + n, state.Corner.PinLevel, "V", $"source voltage of the pin, {feed.Channel} {name}")
            .Given("Rpin" + n, state.Corner.PinResistance, "ohm", "its source resistance")
            .Given(rf, resistor.Resistance, "ohm", "feed resistance in this corner", resistor.Part.Resistance.Cell)
            .Solved("Vb" + n, state.BaseVoltage, "V", "base node");
        if (channel.PullDown is null || channel.PullDownAt != PullDownAt.Pin)
        {
            steps.Step("Ipin" + n, $"(Vpin{n} - Vb{n}) / ({rf} + Rpin{n})", "A", $"pin current of {feed.Channel}");
            return;
        }

        ResistorPoint down = state.Resistors.First(r => r.Role == Role.PullDown);
        string rp = "Rp" + n;
        steps.Given(rp, down.Resistance, "ohm", "pull-down resistance in this corner", down.Part.Resistance.Cell)
            .Step("Vsource" + n, $"Vpin{n} x {rp} / ({rp} + Rpin{n})", "V", "pin and pull-down as one source")
            .Step("Rsource" + n, $"{rf} + Rpin{n} x {rp} / ({rp} + Rpin{n})", "ohm", "its resistance, feed included")
            .Step("If" + n, $"(Vsource{n} - Vb{n}) / Rsource{n}", "A", "feed current")
            .Step("Ipin" + n, $"If{n} + (Vb{n} + If{n} x {rf}) / {rp}", "A", $"pin current of {feed.Channel}, pull-down included");
    }
}

/// <summary>One channel's feed on a pin.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="Current">Its highest current out of the pin [A]; NaN: not known.</param>
public sealed record PinFeed(string Channel, double Current)
{
    /// <summary>The state of that current; null: none.</summary>
    public SolvedState? State { get; init; }

    /// <summary>The reading that it belongs to; null: none.</summary>
    public BoundChannel? Reading { get; init; }

    /// <summary>The feed of a judged channel: the reading that draws most.</summary>
    public static PinFeed Of(string channel, IReadOnlyList<ReadingJudgement> readings)
    {
        ArgumentNullException.ThrowIfNull(readings);
        return readings.MaxBy(r => r.PinMax) is { } worst
            ? new PinFeed(channel, worst.PinMax) { State = worst.PinState, Reading = worst.Channel }
            : new PinFeed(channel, double.NaN);
    }
}
