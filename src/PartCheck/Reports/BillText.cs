using System.Globalization;
using System.Text;
using PartCheck.Bills;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>What was understood of a bill, for a person at a terminal: 80 columns.</summary>
public static class BillText
{
    private const int NameWidth = 14;
    private const int RowWidth = 8;
    private const int ReferencesShown = 60;
    private const int TextShown = 40;
    private const int LinesShown = 5000;
    private const int SkippedShown = 500;

    /// <summary>Writes what was read.</summary>
    public static string Write(BillReading reading)
    {
        ArgumentNullException.ThrowIfNull(reading);
        StringBuilder text = new();
        IReadOnlyList<BillLine> lines = reading.Bill?.Lines ?? [];
        string count = reading.Bill is null
            ? "NO BILL WAS READ"
            : $"{Counted(lines.Count, "line")}, {Counted(lines.Sum(l => l.References.Count), "reference")}";
        Columns80.Wrap(text, string.Empty, $"{reading.File}: {count}", 2);
        foreach (string note in reading.Notes)
        {
            Columns80.Wrap(text, "  ", note, 2);
        }

        text.Append('\n');
        foreach (BillTable table in reading.Bill?.Tables ?? [])
        {
            Table(text, table);
        }

        if (lines.Count > 0)
        {
            text.Append("Lines\n");
            foreach (BillLine line in lines.Take(LinesShown))
            {
                Line(text, line);
            }

            if (lines.Count > LinesShown)
            {
                text.Append(CultureInfo.InvariantCulture, $"  ... and {lines.Count - LinesShown} lines more; --format json lists them all\n");
            }

            text.Append('\n');
        }

        ComplaintText.Append(text, reading.Complaints);
        return text.ToString();
    }

    private static void Table(StringBuilder text, BillTable table)
    {
        string[] taken =
        [
            table.Sheet is null ? "Header" : $"Sheet {table.Sheet}, header",
            $"in row {Whole(table.HeaderRow)};",
            table.Encoding is { } encoding ? $"{encoding}; {table.Separator} between the fields;" : "workbook;",
            table.DecimalComma ? "decimal comma" : "decimal point",
        ];
        Columns80.Wrap(text, string.Empty, string.Join(' ', taken), 2);
        foreach (BillColumn column in table.Columns)
        {
            Columns80.Wrap(text, "  " + column.Name.PadRight(NameWidth), $"{column.Letters} \"{column.Header}\"", NameWidth + 2);
        }

        foreach (string note in table.Notes)
        {
            Columns80.Wrap(text, "  ", note, 4);
        }

        if (table.Skipped.Count > 0)
        {
            text.Append("  Left out\n");
            foreach (SkippedRows skipped in table.Skipped.Take(SkippedShown))
            {
                string rows = skipped.Row == skipped.LastRow ? $"row {Whole(skipped.Row)}" : $"rows {Whole(skipped.Row)} to {Whole(skipped.LastRow)}";
                Columns80.Wrap(text, "    ", $"{rows}: {skipped.Why}, \"{Cut(skipped.Text, TextShown)}\"", 6);
            }

            if (table.Skipped.Count > SkippedShown)
            {
                text.Append(CultureInfo.InvariantCulture, $"    ... and {table.Skipped.Count - SkippedShown} more; --format json lists them all\n");
            }
        }

        text.Append('\n');
    }

    private static void Line(StringBuilder text, BillLine line)
    {
        List<string> said = [line.References.Count == 0 ? "no reference;" : CutList(Ranges(line.References)) + ";"];
        said.Add(line.Quantity is { } quantity ? $"{quantity.ToString(CultureInfo.InvariantCulture)} pcs;" : $"{Whole(ReferenceList.Components(line.References))} counted;");
        said.Add(line.PartNumber is { } number ? Cut(number, TextShown) + ";" : "no part number;");
        if (line.Value is { } value && value != line.PartNumber)
        {
            said.Add($"\"{Cut(value, TextShown)}\"");
        }

        if (line.ToldResistance is { } resistance)
        {
            said.Add("= " + EngineeringNotation.Format(resistance.Ohms, "ohm").Replace(' ', Columns80.Glue));
        }

        if (line.Package is { } package)
        {
            said.Add($"({Cut(package, TextShown)})");
        }

        if (!line.Fitted)
        {
            said.Add("NOT FITTED");
        }

        Columns80.Wrap(text, "  " + Whole(line.Row).PadRight(RowWidth), string.Join(' ', said).TrimEnd(';'), RowWidth + 2);
    }

    /// <summary>References with runs of three and more as ranges: <c>R1 R2 R5..R8</c>.</summary>
    private static string Ranges(IReadOnlyList<string> references)
    {
        List<string> parts = [];
        for (int i = 0; i < references.Count;)
        {
            int end = i;
            while (end + 1 < references.Count && Follows(references[end], references[end + 1]))
            {
                end++;
            }

            parts.AddRange(end - i >= 2 ? [$"{references[i]}..{references[end]}"] : references.Skip(i).Take(end - i + 1));
            i = end + 1;
        }

        return string.Join(' ', parts);
    }

    private static bool Follows(string one, string next)
    {
        string letters = one.TrimEnd(['0', '1', '2', '3', '4', '5', '6', '7', '8', '9']);
        return next.StartsWith(letters, StringComparison.Ordinal)
            && int.TryParse(one.AsSpan(letters.Length), NumberStyles.None, CultureInfo.InvariantCulture, out int a)
            && int.TryParse(next.AsSpan(letters.Length), NumberStyles.None, CultureInfo.InvariantCulture, out int b)
            && b == a + 1;
    }

    /// <summary>A list of references cut between two of them.</summary>
    private static string CutList(string list) =>
        list.Length > ReferencesShown && list.LastIndexOf(' ', ReferencesShown) is > 0 and int blank ? list[..blank] + " ..." : Cut(list, ReferencesShown);

    private static string Cut(string text, int most)
    {
        string one = string.Join(' ', text.Split((char[])['\r', '\n', '\t', ' '], StringSplitOptions.RemoveEmptyEntries));
        return one.Length <= most ? one : one[..most] + "...";
    }

    private static string Counted(int count, string what) => $"{Whole(count)} {what}{(count == 1 ? string.Empty : "s")}";

    private static string Whole(int value) => value.ToString(CultureInfo.InvariantCulture);
}
