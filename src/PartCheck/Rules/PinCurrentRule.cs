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
    /// <param name="feeds">Channels on the pin with the highest current of each [A]; NaN: not known.</param>
    /// <param name="logic">The pin's row.</param>
    /// <param name="derating">Derating table.</param>
    public static Finding Judge(string pin, IReadOnlyList<(string Channel, double Current)> feeds, LogicPin logic, DeratingTable derating)
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
        };
    }
}
