using PartCheck.Reports;

namespace PartCheck;

/// <summary>What a run of <c>check</c> is asked.</summary>
public sealed record CheckRequest
{
    /// <summary>Boards: workbooks or folders, as given.</summary>
    public required IReadOnlyList<string> Boards { get; init; }

    /// <summary>Part tables; empty: each board's own.</summary>
    public IReadOnlyList<string> Parts { get; init; } = [];

    /// <summary>A bill apart from the board, FILE or FILE:SHEET; null: the board's.</summary>
    public string? Bill { get; init; }

    /// <summary>A channels table apart from the board, FILE or FILE:SHEET; null: the board's.</summary>
    public string? Channels { get; init; }

    /// <summary>Derating table: a name or a file; null: <c>workshop</c>.</summary>
    public string? Derating { get; init; }

    /// <summary>Logic pins file; null: the board's, else the project's own.</summary>
    public string? Pins { get; init; }

    /// <summary>Further header spellings; null: none.</summary>
    public string? Columns { get; init; }

    /// <summary>Name of the text encoding of CSV files; null: found out.</summary>
    public string? Encoding { get; init; }

    /// <summary>Threads to use; 0: all. The output does not depend on it.</summary>
    public int Threads { get; init; }
}

/// <summary>The run that knows every room: inputs at the left, reports at the right.</summary>
public static class CheckRun
{
    /// <summary>Checks boards.</summary>
    /// <param name="request">What is asked.</param>
    /// <param name="cancel">Stops the run.</param>
    /// <returns>The report; the user's errors are complaints in it, never exceptions.</returns>
    public static CheckReport Run(CheckRequest request, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(request);
        cancel.ThrowIfCancellationRequested();
        return new CheckReport([], [], []);
    }
}
