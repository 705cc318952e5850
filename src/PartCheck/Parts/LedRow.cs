using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>One row of kind <c>led</c>.</summary>
internal static class LedRow
{
    private static readonly LedValidator Rules = new();

    public static LedPart Read(TableRow row, string number)
    {
        LedPart part = new()
        {
            PartNumber = number,
            Manufacturer = row.Text("Manufacturer"),
            Mounting = row.Text("Mounting"),
            Package = row.Text("Package"),
            Cell = row.Cite("Part number"),
            Lifecycle = row.Text("Lifecycle"),
            Stock = row.Number("Stock")?.Value,
            Source = row.Text("Source"),
            ForwardCurrentMax = row.Quantity("IF", Current.FromAmperes),
            ForwardCurrentFlatTo = row.Quantity("IF flat to", Temperature.FromKelvins),
            ForwardCurrentSlope = row.Number("IF slope"),
            TjMax = row.Quantity("Tj max", Temperature.FromKelvins),
        };
        row.Check(Rules, part);
        return part;
    }
}
