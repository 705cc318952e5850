using PartCheck.Bills;

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

    /// <summary>Other parts to judge the board with, beside the bill as it stands; empty: the bill as it stands.</summary>
    public IReadOnlyList<AskedChange> With { get; init; } = [];

    /// <summary>The assembly to judge, as a column <c>Populated NAME</c> of the bill names it; null: the board as its bill stands.</summary>
    public string? Assembly { get; init; }

    /// <summary>A concessions table, FILE or FILE:SHEET; null: the board's.</summary>
    public string? Concessions { get; init; }

    /// <summary>The day that concessions are held against; null: none is given, and a board that has concessions cannot be judged.</summary>
    public DateOnly? Date { get; init; }

    /// <summary>Further header spellings; null: none.</summary>
    public string? Columns { get; init; }

    /// <summary>Name of the text encoding of CSV files; null: found out.</summary>
    public string? Encoding { get; init; }

    /// <summary>Threads to use; 0: all. The output does not depend on it.</summary>
    public int Threads { get; init; }
}
