using PartCheck.Reports;
using PartCheck.Rules;

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
        if (report.Complaints.Any(c => c.NoInput))
        {
            return NoInput;
        }

        if (report.Complaints.Count > 0)
        {
            return Data;
        }

        return verdict switch
        {
            Verdict.Conforms or Verdict.Concession => 0,
            Verdict.Nonconforming => 1,
            _ => 2,
        };
    }
}
