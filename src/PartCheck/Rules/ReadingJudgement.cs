using PartCheck.Channels;
using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>One reading of a channel, judged.</summary>
/// <param name="Channel">The reading.</param>
/// <param name="Findings">Findings of all rules that read states.</param>
/// <param name="Nominal">The nominal state; null: not solved.</param>
/// <param name="LoadMin">Smallest load current, state on [A].</param>
/// <param name="LoadMax">Largest load current, state on [A].</param>
/// <param name="PinMax">Largest current out of the pin into this channel, on and unfed [A].</param>
/// <param name="Corners">Corners solved.</param>
/// <param name="NotSolved">Corners that the solver gave up on.</param>
public sealed record ReadingJudgement(
    BoundChannel Channel, IReadOnlyList<Finding> Findings, SolvedState? Nominal, double LoadMin, double LoadMax, double PinMax,
    int Corners, int NotSolved)
{
    /// <summary>Largest heat of the channel's parts on the board while on, whatever the duty, the load left out [W].</summary>
    public double HeatMax { get; init; }

    /// <summary>The state of <see cref="PinMax"/>; null: the pin delivers nothing.</summary>
    public SolvedState? PinState { get; init; }

    /// <summary>Each transistor with its highest junction temperature [K].</summary>
    public IReadOnlyList<(string Reference, double Tj)> Hottest { get; init; } = [];

    /// <summary>Highest dissipation of each transistor, state on, averaged where <c>power</c> averages [W], by reference.</summary>
    public IReadOnlyDictionary<string, double> MostPower { get; init; } = new Dictionary<string, double>();

    /// <summary>What a good channel measures on the bench; null: not solved.</summary>
    public TestLimits? TestLimits { get; init; }

    /// <summary>What the solved corners turned out to assume.</summary>
    public IReadOnlyList<Assumption> Assumed { get; init; } = [];
}
