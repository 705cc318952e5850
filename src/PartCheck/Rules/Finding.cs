using PartCheck.Channels;
using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>One rule applied to one reference (or line, channel, pin), at its worst corner.</summary>
public sealed record Finding
{
    /// <summary>The channel; null for line and pin rules.</summary>
    public string? Channel { get; init; }

    /// <summary>Rule identifier.</summary>
    public required string Rule { get; init; }

    /// <summary>The reference; null for channel, line and pin rules.</summary>
    public string? Reference { get; init; }

    /// <summary>References of a line rule.</summary>
    public IReadOnlyList<string>? References { get; init; }

    /// <summary>Pin of a pin rule.</summary>
    public string? Pin { get; init; }

    /// <summary>Channels of a pin rule, or those a line serves.</summary>
    public IReadOnlyList<string>? Channels { get; init; }

    /// <summary>Part number of the row judged.</summary>
    public string? PartNumber { get; init; }

    /// <summary>Manufacturer of the row judged.</summary>
    public string? Manufacturer { get; init; }

    /// <summary>The mix of parts that is the worst, for each line that offers several part numbers or manufacturers; empty: none does.</summary>
    public IReadOnlyList<MixedLine> Mix { get; init; } = [];

    /// <summary>State of the worst corner; null where no state is read.</summary>
    public ChannelState? State { get; init; }

    /// <summary>The value where the stress ratio is worst, SI; null: none.</summary>
    public double? Actual { get; init; }

    /// <summary>True where the actual value is a lower bound (a junction that ran away).</summary>
    public bool ActualIsAtLeast { get; init; }

    /// <summary>The rating at temperature after derating, SI; null: none.</summary>
    public double? Allowed { get; init; }

    /// <summary>SI unit of actual and allowed (<c>V</c>, <c>A</c>, <c>W</c>, <c>K</c>); null: none.</summary>
    public string? Unit { get; init; }

    /// <summary>Actual over allowed; null where it has none.</summary>
    public double? StressRatio { get; init; }

    /// <summary>1 - stress ratio.</summary>
    public double? Margin => 1 - StressRatio;

    /// <summary>The verdict.</summary>
    public Verdict Verdict { get; init; }

    /// <summary>The worst corner; null where no state is read.</summary>
    public Corner? Corner { get; init; }

    /// <summary>Where the limit's factor comes from.</summary>
    public required string Source { get; init; }

    /// <summary>The cell that decided it.</summary>
    public string? Cell { get; init; }

    /// <summary>One sentence, where numbers do not say it.</summary>
    public string? Text { get; init; }

    /// <summary>What it was accepted under, where the verdict is concession.</summary>
    public GrantedConcession? Concession { get; init; }

    /// <summary>What is missing, when not verified.</summary>
    public IReadOnlyList<string> Missing { get; init; } = [];

    /// <summary>The state, rule and rows that it was judged from; null: it reads no state, or there was none to judge.</summary>
    public FindingBasis? Basis { get; init; }

    /// <summary>Its equation with numbers, where it reads no state; null: <see cref="Basis"/> gives it.</summary>
    public Derivation? Derivation { get; init; }
}

/// <summary>Currents, voltages and temperatures of the nominal state, and the extremes of the load current.</summary>
/// <param name="Min">Smallest load current over all corners, state on [A].</param>
/// <param name="Nominal">Nominal load current [A].</param>
/// <param name="Max">Largest load current [A].</param>
public sealed record LoadCurrentRange(double Min, double Nominal, double Max);

/// <summary>One channel, judged.</summary>
public sealed record ChannelJudgement
{
    /// <summary>The channel's name.</summary>
    public required string Channel { get; init; }

    /// <summary>Worst of its findings.</summary>
    public required Verdict Verdict { get; init; }

    /// <summary>Name of the derating table it was judged by.</summary>
    public required string Derating { get; init; }

    /// <summary>Load current; null when the channel could not be solved.</summary>
    public LoadCurrentRange? LoadCurrent { get; init; }

    /// <summary>The nominal state; null when the channel could not be solved.</summary>
    public SolvedState? Nominal { get; init; }

    /// <summary>The reading of the bill that <see cref="Nominal"/> belongs to (the worst one), for its references.</summary>
    public BoundChannel? Reading { get; init; }

    /// <summary>What a good channel measures on the bench; null: not solved.</summary>
    public TestLimits? TestLimits { get; init; }

    /// <summary>Largest heat of the channel's parts on the board while on, whatever the duty, the load left out [W]; null: not solved.</summary>
    public double? HeatMax { get; init; }

    /// <summary>Each transistor with its highest junction temperature, under PWM the peak [K], hottest first.</summary>
    public IReadOnlyList<(string Reference, double Tj)> Hottest { get; init; } = [];

    /// <summary>Corners solved, over all states and readings.</summary>
    public int CornersSolved { get; init; }

    /// <summary>Corners that the solver gave up on (target 0).</summary>
    public int NotSolved { get; init; }

    /// <summary>Findings, all rules.</summary>
    public required IReadOnlyList<Finding> Findings { get; init; }

    /// <summary>What was assumed.</summary>
    public required IReadOnlyList<Assumption> Assumed { get; init; }
}
