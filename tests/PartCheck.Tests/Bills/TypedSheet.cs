using PartCheck.Sheets;

namespace PartCheck.Tests.Bills;

/// <summary>A sheet as a person would type it: lines of cells between bars, the first line its header.</summary>
internal sealed class TypedSheet
{
    public ComplaintList List { get; } = new();

    public IReadOnlyList<Complaint> Complaints => List.Items;

    public ColumnSpellings Spellings => ColumnSpellings.Load(null, List);

    public static SheetData Of(string file, params string[] lines)
    {
        List<IReadOnlyList<SheetCell>> rows = [];
        for (int r = 0; r < lines.Length; r++)
        {
            string[] cells = lines[r].Split('|');
            rows.Add([.. cells.Select((text, c) => new SheetCell(r + 1, c + 1, text.Trim(), null, false)).Where(cell => cell.Text.Length > 0)]);
        }

        return new SheetData(file, null, false, [.. rows.Where(row => row.Count > 0)]);
    }

    /// <summary>The one complaint there is, as cell and sentence.</summary>
    public string Only()
    {
        Complaint complaint = Xunit.Assert.Single(Complaints);
        return complaint.Cell + " " + complaint.Text;
    }
}
