using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>Header spellings of every table's columns: the project's own (<c>partdata/columns.csv</c>) and the user's.</summary>
public sealed class ColumnSpellings
{
    /// <summary>Loads the embedded spellings and, where given, the user's file (same three columns: Table, Column, Spelling).</summary>
    public static ColumnSpellings Load(string? userFile, ComplaintList complaints) => throw new NotSupportedException();
}

/// <summary>Reads spreadsheet files into sheets.</summary>
public static class SheetFile
{
    /// <summary>Every sheet of an XLSX workbook in order, or the one sheet of a CSV file. Failures are complaints and an empty list.</summary>
    /// <param name="path">Path to open.</param>
    /// <param name="shownName">The name used in complaints and citations.</param>
    /// <param name="encoding">Name of the text encoding for CSV; null: found out.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static IReadOnlyList<SheetData> Read(string path, string shownName, string? encoding, ComplaintList complaints) =>
        throw new NotSupportedException();
}

/// <summary>A table found in a sheet: header row and data rows.</summary>
public sealed class Table
{
    /// <summary>Finds the header row (rows 1 to 20), maps its columns; complains and returns null where there is none.</summary>
    /// <param name="sheet">The sheet.</param>
    /// <param name="tableName">Name in the spellings file: BOM, Channels, Parts, Pins, Derating.</param>
    /// <param name="columns">Columns the table may have.</param>
    /// <param name="spellings">Header spellings.</param>
    /// <param name="complaints">Where complaints go.</param>
    public static Table? Find(
        SheetData sheet, string tableName, IReadOnlyList<ColumnSpec> columns, ColumnSpellings spellings, ComplaintList complaints) =>
        throw new NotSupportedException();

    /// <summary>Data rows in order (section, totals and repeated header rows left out).</summary>
    public IReadOnlyList<TableRow> Rows => throw new NotSupportedException();

    /// <summary>True where the sheet has the column.</summary>
    public bool Has(string column) => throw new NotSupportedException();
}

/// <summary>One data row.</summary>
public sealed class TableRow
{
    /// <summary>One-based row in the sheet.</summary>
    public int Row => throw new NotSupportedException();

    /// <summary>When set, complaints about this row carry it as their channel.</summary>
    public string? Channel { get; set; }

    /// <summary>True once this row has raised a complaint.</summary>
    public bool HasComplaints => throw new NotSupportedException();

    /// <summary>The cell's trimmed text; null when blank or when the sheet has no such column.</summary>
    public string? Text(string column) => throw new NotSupportedException();

    /// <summary>The cell's value in SI by its column's kind (percent as a share, temperatures in kelvins); null when blank; an unreadable one is a complaint and null.</summary>
    public Cited<double>? Number(string column) => throw new NotSupportedException();

    /// <summary>Parses a text that is part of a cell (such as one point of a list) as a kind of quantity, with this file's decimal sign; null with a complaint when unreadable.</summary>
    public double? Part(string column, string text, ColumnKind kind) => throw new NotSupportedException();

    /// <summary>File and cell of a column in this row (the row's first cell where the sheet has no such column).</summary>
    public string Cite(string column) => throw new NotSupportedException();

    /// <summary>Raises a complaint about a column of this row.</summary>
    public void Complain(string column, string wanted, string text) => throw new NotSupportedException();
}
