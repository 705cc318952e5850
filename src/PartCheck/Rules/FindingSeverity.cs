namespace PartCheck.Rules;

/// <summary>Orders verdicts and findings by how bad they are.</summary>
public static class FindingSeverity
{
    /// <summary>Nonconforming above not verified above concession above conforms.</summary>
    public static int Rank(Verdict verdict) => verdict switch { Verdict.Nonconforming => 3, Verdict.NotVerified => 2, Verdict.Concession => 1, _ => 0 };

    /// <summary>The worst of verdicts; nothing judged is not verified.</summary>
    public static Verdict WorstOf(IEnumerable<Verdict> verdicts)
    {
        ArgumentNullException.ThrowIfNull(verdicts);
        Verdict? worst = null;
        foreach (Verdict verdict in verdicts)
        {
            worst = worst is null || Rank(verdict) > Rank(worst.Value) ? verdict : worst;
        }

        return worst ?? Verdict.NotVerified;
    }

    /// <summary>True where one finding is worse than another of the same rule and reference.</summary>
    public static bool Worse(Finding one, Finding other)
    {
        ArgumentNullException.ThrowIfNull(one);
        ArgumentNullException.ThrowIfNull(other);
        return Rank(one.Verdict) != Rank(other.Verdict) ? Rank(one.Verdict) > Rank(other.Verdict) : Ratio(one) > Ratio(other);
    }

    private static double Ratio(Finding f) => f.StressRatio ?? (f.Verdict == Verdict.Nonconforming ? double.PositiveInfinity : -1);
}
