namespace PartCheck.Rules;

/// <summary>Verdicts in the words of ISO 9000:2015; the default is <see cref="NotVerified"/>.</summary>
public enum Verdict
{
    /// <summary>Data missing or not guaranteed.</summary>
    NotVerified,

    /// <summary>The requirement is met.</summary>
    Conforms,

    /// <summary>The requirement is not met.</summary>
    Nonconforming,
}
