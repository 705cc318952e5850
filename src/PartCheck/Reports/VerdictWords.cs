using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>The words of a verdict and of a state, the same in every report.</summary>
public static class VerdictWords
{
    /// <summary><c>conforms</c>, <c>nonconforming</c>, <c>not verified</c> or <c>concession</c>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The verdict is none of the four.</exception>
    public static string Of(Verdict verdict) => verdict switch
    {
        Verdict.Conforms => "conforms",
        Verdict.Nonconforming => "nonconforming",
        Verdict.NotVerified => "not verified",
        Verdict.Concession => "concession",
        _ => throw new ArgumentOutOfRangeException(nameof(verdict), verdict, "A verdict is one of the four."),
    };
}
