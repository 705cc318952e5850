using System.Text;
using System.Text.Json;
using PartCheck.Bills;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>
/// What was understood of a bill, for machines: resistances in ohm, stable order of keys and items, the file's name as given.
/// </summary>
public static class BillJson
{
    /// <summary>Writes what was read.</summary>
    /// <returns>JSON with LF line ends and a line end at its end.</returns>
    public static string Write(BillReading reading)
    {
        ArgumentNullException.ThrowIfNull(reading);
        using var bytes = new MemoryStream();
        using (var json = new Utf8JsonWriter(bytes, JsonReport.Options))
        {
            json.WriteStartObject();
            json.Text("file", reading.File);
            json.Texts("notes", reading.Notes);
            json.List("tables", reading.Bill?.Tables ?? [], Table);
            json.List("lines", reading.Bill?.Lines ?? [], Line);
            json.List("complaints", reading.Complaints, JsonReport.WriteComplaint);
            json.WriteEndObject();
        }

        bytes.WriteByte((byte)'\n');
        return Encoding.UTF8.GetString(bytes.GetBuffer(), 0, checked((int)bytes.Length));
    }

    private static void Table(Utf8JsonWriter json, BillTable table)
    {
        json.Text("sheet", table.Sheet);
        json.Whole("headerRow", table.HeaderRow);
        json.WriteStartObject("columns");
        foreach (BillColumn column in table.Columns)
        {
            json.Text(column.Name, column.Header);
        }

        json.WriteEndObject();
        json.Text("encoding", table.Encoding);
        json.Text("separator", table.Separator);
        json.Text("decimalSign", table.DecimalComma ? "comma" : "point");
        json.List("leftOut", table.Skipped, (into, rows) =>
        {
            into.Whole("row", rows.Row);
            into.Whole("lastRow", rows.LastRow);
            into.Text("why", rows.Why);
            into.Text("text", rows.Text);
        });
        json.Texts("notes", table.Notes);
    }

    private static void Line(Utf8JsonWriter json, BillLine line)
    {
        json.Text("sheet", line.Sheet);
        json.Whole("row", line.Row);
        json.Texts("references", line.References);
        json.Real("quantity", line.Quantity);
        json.Text("partNumber", line.PartNumber);
        json.Text("manufacturer", line.Manufacturer);
        json.Text("value", line.Value);
        json.Real("resistance", line.ToldResistance?.Ohms);
        json.Text("package", line.Package);
        json.WriteBoolean("fitted", line.Fitted);
        json.Texts("alternates", line.Alternates);
    }
}
