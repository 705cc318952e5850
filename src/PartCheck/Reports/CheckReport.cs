using PartCheck.Channels;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>An assumed value and the channels that used it.</summary>
public sealed record AssumedValue(string What, string Of, string Value, IReadOnlyList<string> Channels);

/// <summary>A remark that is never a verdict.</summary>
public sealed record Advice(string? Channel, string? Reference, string Text);

/// <summary>One board, judged.</summary>
public sealed record BoardReport
{
    /// <summary>The board as the user named it.</summary>
    public required string Board { get; init; }

    /// <summary>Worst of its channels and findings; null when the board could not be read at all (printed as not verified).</summary>
    public Verdict Verdict { get; init; }

    /// <summary>Name of the run's derating table.</summary>
    public required string Derating { get; init; }

    /// <summary>What every output that uses the table must say; null: nothing.</summary>
    public string? DeratingNote { get; init; }

    /// <summary>The day that concessions were held against; null: the board has none.</summary>
    public DateOnly? ConcessionsAsOf { get; init; }

    /// <summary>The assembly judged; null: the board as its bill stands.</summary>
    public string? Assembly { get; init; }

    /// <summary>Channels that are not there in the assembly, since none of their parts is fitted: not judged.</summary>
    public IReadOnlyList<string> ChannelsNotFitted { get; init; } = [];

    /// <summary>Channels in the sheet's order.</summary>
    public required IReadOnlyList<ChannelJudgement> Channels { get; init; }

    /// <summary>Every finding, worst first.</summary>
    public required IReadOnlyList<Finding> Findings { get; init; }

    /// <summary>Sums over the board; null where nothing was judged.</summary>
    public BoardTotals? Totals { get; init; }

    /// <summary>Identifiers of the rules judged.</summary>
    public required IReadOnlyList<string> Rules { get; init; }

    /// <summary>Identifiers of rules of the design that this version does not judge.</summary>
    public IReadOnlyList<string> RulesNotJudged { get; init; } = [];

    /// <summary>Assumed values.</summary>
    public required IReadOnlyList<AssumedValue> Assumed { get; init; }

    /// <summary>Remarks.</summary>
    public required IReadOnlyList<Advice> Advice { get; init; }

    /// <summary>Safety cautions.</summary>
    public required IReadOnlyList<string> Cautions { get; init; }

    /// <summary>Beside the bill as it stands, where other parts were asked for; null: none were.</summary>
    public BoardComparison? Comparison { get; init; }
}

/// <summary>One input file and its hash.</summary>
/// <param name="File">Name as given.</param>
/// <param name="Sha256">Lower-case hexadecimal SHA-256.</param>
public sealed record InputFile(string File, string Sha256);

/// <summary>Everything one run of <c>check</c> found: what the reports print.</summary>
public sealed record CheckReport(
    IReadOnlyList<BoardReport> Boards, IReadOnlyList<Complaint> Complaints, IReadOnlyList<InputFile> Inputs)
{
    /// <summary>What the question itself asks wrongly (a line that is not on the bill); with any of it nothing was judged.</summary>
    public IReadOnlyList<string> UsageFaults { get; init; } = [];
}
