using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>One data row.</summary>
public sealed class TableRow
{
    private readonly Table table;
    private readonly IReadOnlyList<SheetCell> cells;
    private readonly Dictionary<string, Cited<double>?> numbers = new(StringComparer.OrdinalIgnoreCase);

    internal TableRow(Table table, IReadOnlyList<SheetCell> cells)
    {
        this.table = table;
        this.cells = cells;
    }

    /// <summary>One-based row in the sheet.</summary>
    public int Row => cells[0].Row;

    /// <summary>When set, complaints about this row carry it as their channel.</summary>
    public string? Channel { get; set; }

    /// <summary>True once this row has raised a complaint.</summary>
    public bool HasComplaints { get; private set; }

    /// <summary>The cell's trimmed text; null when blank or when the sheet has no such column.</summary>
    public string? Text(string column) => CellOf(column)?.Text;

    /// <summary>The cell's value in SI by its column's kind (percent as a share, temperatures in kelvins); null when blank; an unreadable one is a complaint and null.</summary>
    public Cited<double>? Number(string column)
    {
        if (!numbers.TryGetValue(column, out Cited<double>? number))
        {
            number = Read(column);
            numbers[column] = number;
        }

        return number;
    }

    /// <summary>Parses a text that is part of a cell (such as one point of a list) as a kind of quantity, with this file's decimal sign; null with a complaint when unreadable.</summary>
    public double? Part(string column, string text, ColumnKind kind)
    {
        ArgumentNullException.ThrowIfNull(text);
        QuantityKind quantity = ColumnKindMap.QuantityOf(kind)
            ?? throw new ArgumentOutOfRangeException(nameof(kind), kind, "A text is no quantity.");
        if (QuantityParser.TryParse(text, quantity, table.Sheet.DecimalComma, null, out QuantityReading reading))
        {
            return reading.Si;
        }

        Complain(column, reading.Wanted, ComplaintTexts.Unreadable(
            reading.Trouble, HeaderOf(column), text.Trim(), reading.Wanted, table.Sheet.DecimalComma));
        return null;
    }

    /// <summary>File and cell of a column in this row (the row's first cell where the sheet has no such column).</summary>
    public string Cite(string column) => table.Sheet.Cite(Row, IndexOf(column));

    /// <summary>Raises a complaint about a column of this row.</summary>
    /// <param name="column">The column.</param>
    /// <param name="wanted">What is wanted instead.</param>
    /// <param name="text">The whole sentence, without file and cell.</param>
    public void Complain(string column, string wanted, string text)
    {
        HasComplaints = true;
        table.Complaints.Add(new Complaint(
            table.Sheet.File, table.Sheet.Sheet, Row, HeaderOf(column), CellAddress.Of(Row, IndexOf(column)), Text(column), wanted, text)
        {
            Channel = Channel,
        });
    }

    private Cited<double>? Read(string column)
    {
        if (table.ColumnOf(column) is not { } found || CellOf(column) is not { } cell)
        {
            return null;
        }

        CellNumber number = CellNumber.Read(cell, found, table.Sheet.DecimalComma);
        if (number.Text is { } sentence)
        {
            Complain(column, number.Wanted, sentence);
        }

        HasComplaints |= number.UnderWrongHeader;
        return number.Si is { } si ? new Cited<double>(si, Cite(column)) : null;
    }

    private SheetCell? CellOf(string column)
    {
        if (table.ColumnOf(column) is { } found)
        {
            foreach (SheetCell cell in cells)
            {
                if (cell.Column == found.Index)
                {
                    return cell;
                }
            }
        }

        return null;
    }

    private int IndexOf(string column) => table.ColumnOf(column)?.Index ?? cells[0].Column;

    private string HeaderOf(string column) => table.HeaderOf(column) ?? column;
}
