using PartCheck.Quantities;

namespace PartCheck.Sheets;

/// <summary>One data row.</summary>
public sealed class TableRow
{
    private readonly Table table;
    private readonly IReadOnlyList<SheetCell> cells;
    private readonly Dictionary<string, Cited<double>?> numbers = new(StringComparer.OrdinalIgnoreCase);
    private readonly HashSet<string> withoutValue = new(StringComparer.OrdinalIgnoreCase);

    internal TableRow(Table table, IReadOnlyList<SheetCell> cells, int block)
    {
        this.table = table;
        this.cells = cells;
        Block = block;
    }

    /// <summary>One-based row in the sheet.</summary>
    public int Row => cells[0].Row;

    /// <summary>How often the header stood again above this row.</summary>
    public int Block { get; }

    /// <summary>When set, complaints about this row carry it as their channel.</summary>
    public string? Channel { get; set; }

    /// <summary>True once this row has raised a complaint.</summary>
    public bool HasComplaints { get; private set; }

    /// <summary>
    /// The cell's trimmed text; null when blank or when the sheet has no such column. A cell that holds no value (a formula without a
    /// stored result, an error) is a complaint and null. In a cell merged downwards every row reads its text.
    /// </summary>
    public string? Text(string column)
    {
        if (CellOf(column) is not { } cell)
        {
            return null;
        }

        return cell.Trouble is { } trouble ? NoValue(column, trouble, "a text") : cell.Text;
    }

    /// <summary>True where a cell is shown as a date: a spreadsheet may have made it of a text.</summary>
    public bool IsDate(string column) => CellOf(column)?.Date == true;

    /// <summary>True where a column's cell is merged with one above and this row only continues it.</summary>
    public bool ContinuesAbove(string column) =>
        table.ColumnOf(column) is { } found && table.Sheet.Layout.MergedFrom(Row, found.Index) is not null;

    /// <summary>In a separated text, the last field where the row has more fields than its header, with its column's letters; null: it has not.</summary>
    public (string Text, string Letters)? BeyondHeader =>
        table.Sheet.Fields is { } fields && cells[^1].Column > fields.GetValueOrDefault(table.HeaderRow)
            ? (cells[^1].Text, CellAddress.LettersOf(cells[^1].Column))
            : null;

    /// <summary>Leaves the row out, with the reason.</summary>
    public void Skip(string why) => table.Skip(cells, why);

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

    /// <summary>The header of a column as it stands in the sheet; the column's own name where the sheet has no such column.</summary>
    public string HeaderOf(string column) => table.HeaderOf(column) ?? column;

    /// <summary>File and cell of a column in this row (the row's first cell where the sheet has no such column).</summary>
    public string Cite(string column) => table.Sheet.Cite(Row, IndexOf(column));

    /// <summary>Raises a complaint about a column of this row.</summary>
    /// <param name="column">The column.</param>
    /// <param name="wanted">What is wanted instead.</param>
    /// <param name="text">The whole sentence, without file and cell.</param>
    public void Complain(string column, string wanted, string text)
    {
        HasComplaints = true;
        table.Complaints.Add(ComplaintOf(column, wanted, text));
    }

    /// <summary>A complaint about a column of this row, not raised.</summary>
    /// <param name="column">The column.</param>
    /// <param name="wanted">What is wanted instead.</param>
    /// <param name="text">The whole sentence, without file and cell.</param>
    public Complaint ComplaintOf(string column, string wanted, string text) => new(
        table.Sheet.File, table.Sheet.Sheet, Row, HeaderOf(column), CellAddress.Of(Row, IndexOf(column)), CellOf(column)?.Text, wanted, text)
    {
        Channel = Channel,
    };

    private string? NoValue(string column, string trouble, string wanted)
    {
        if (withoutValue.Add(column))
        {
            Complain(column, wanted, $"{trouble}.");
        }

        return null;
    }

    private Cited<double>? Read(string column)
    {
        if (table.ColumnOf(column) is not { } found || CellOf(column) is not { } cell)
        {
            return null;
        }

        if (cell.Trouble is { } trouble)
        {
            NoValue(column, trouble, QuantityUnits.WantedOf(ColumnKindMap.QuantityOf(found.Spec.Kind) ?? QuantityKind.Number));
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
        if (table.ColumnOf(column) is not { } found)
        {
            return null;
        }

        foreach (SheetCell cell in cells)
        {
            if (cell.Column == found.Index)
            {
                return cell;
            }
        }

        return table.Sheet.Layout.MergedFrom(Row, found.Index) is { } above ? table.CellAt(above, found.Index) : null;
    }

    private int IndexOf(string column) => table.ColumnOf(column)?.Index ?? cells[0].Column;
}
