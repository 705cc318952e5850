using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck.Cli;

/// <summary>Exit codes: verdicts below 3, trouble by sysexits.</summary>
internal static class ExitCodes
{
    public const int Usage = 64;
    public const int Data = 65;
    public const int NoInput = 66;
    public const int Internal = 70;
    public const int CannotCreate = 73;
    public const int WriteFailure = 74;
    public const int Interrupted = 130;

    /// <summary>The code of a report: 66, 65, then 1, 2, 0.</summary>
    public static int Of(CheckReport report) => Of(report, FindingSeverity.WorstOf(report.Boards.Select(b => b.Verdict)));

    /// <summary>The code of a run whose verdict is that of what it shows.</summary>
    public static int Of(CheckReport report, Verdict verdict)
    {
        if (Of(report.Complaints) is var trouble and not 0)
        {
            return trouble;
        }

        return verdict switch
        {
            Verdict.Conforms or Verdict.Concession => 0,
            Verdict.Nonconforming => 1,
            _ => 2,
        };
    }

    /// <summary>The code of complaints alone: 66, 65, 0.</summary>
    public static int Of(IReadOnlyList<Complaint> complaints) =>
        complaints.Any(c => c.NoInput) ? NoInput : complaints.Count > 0 ? Data : 0;
}
