using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>
/// The worst of one rule for one slot over the states seen so far: nonconforming in any state that can be judged wins, else
/// a state that cannot be judged, else the highest ratio. Ties keep the earlier corner.
/// </summary>
internal sealed class Worst
{
    private Stress stress;
    private readonly SortedSet<string> missing = new(StringComparer.Ordinal);

    /// <summary>The state of the worst stress; null: none was judged.</summary>
    public SolvedState? State { get; private set; }

    /// <summary>The worst stress judged.</summary>
    public Stress Stress => stress;

    /// <summary>What was missing in states that could not be judged.</summary>
    public IReadOnlyCollection<string> Missing => missing;

    /// <summary>True once anything was seen.</summary>
    public bool Seen => State is not null || missing.Count > 0;

    /// <summary>The verdict over all states seen.</summary>
    public Verdict Verdict => State is not null && stress.Verdict == Verdict.Nonconforming ? Verdict.Nonconforming
        : missing.Count > 0 || State is null ? Verdict.NotVerified
        : stress.Verdict;

    /// <summary>Takes one state's stress.</summary>
    public void Take(in Stress candidate, SolvedState state)
    {
        if (candidate.Verdict == Verdict.NotVerified)
        {
            if (missing.Count < 8)
            {
                missing.Add(candidate.Missing ?? "data");
            }
        }
        else if (State is null || IsWorse(candidate))
        {
            stress = candidate;
            State = state;
        }
    }

    /// <summary>Takes a later chunk's worst.</summary>
    public void Merge(Worst later)
    {
        foreach (string what in later.missing)
        {
            missing.Add(what);
        }

        if (later.State is not null && (State is null || IsWorse(later.stress)))
        {
            stress = later.stress;
            State = later.State;
        }
    }

    /// <summary>True where this is worse than another: verdict first, then ratio.</summary>
    public bool WorseThan(Worst other) =>
        Rank(Verdict) != Rank(other.Verdict) ? Rank(Verdict) > Rank(other.Verdict) : stress.Worse(other.stress) > 0;

    private bool IsWorse(in Stress candidate) =>
        (candidate.Verdict == Verdict.Nonconforming) != (stress.Verdict == Verdict.Nonconforming)
            ? candidate.Verdict == Verdict.Nonconforming
            : candidate.Worse(stress) > 0;

    private static int Rank(Verdict verdict) => verdict switch { Verdict.Nonconforming => 2, Verdict.NotVerified => 1, _ => 0 };
}
