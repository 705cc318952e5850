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

    /// <summary>The requirement is not met, and that was accepted in writing by someone named, until a day named.</summary>
    Concession,
}
