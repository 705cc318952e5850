using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>One column that was read.</summary>
/// <param name="Name">The column's own name.</param>
/// <param name="Header">The header as it stands in the sheet.</param>
/// <param name="Letters">Its letters, e.g. <c>D</c>.</param>
public sealed record BillColumn(string Name, string Header, string Letters);

/// <summary>A table of a bill and how it was read.</summary>
public sealed record BillTable
{
    /// <summary>The sheet's name; null for CSV.</summary>
    public string? Sheet { get; init; }

    /// <summary>One-based row of the header.</summary>
    public required int HeaderRow { get; init; }

    /// <summary>Text encoding; null for a workbook.</summary>
    public string? Encoding { get; init; }

    /// <summary>What separates the fields; null for a workbook.</summary>
    public string? Separator { get; init; }

    /// <summary>True where decimals are written with a comma.</summary>
    public bool DecimalComma { get; init; }

    /// <summary>The columns that are read, in the sheet's order.</summary>
    public required IReadOnlyList<BillColumn> Columns { get; init; }

    /// <summary>Rows left out, with their reasons.</summary>
    public required IReadOnlyList<SkippedRows> Skipped { get; init; }

    /// <summary>What else must be said: hidden rows and columns, merged cells, a second table.</summary>
    public required IReadOnlyList<string> Notes { get; init; }
}
