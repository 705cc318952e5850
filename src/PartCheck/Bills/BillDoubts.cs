using System.Globalization;
using System.Text.RegularExpressions;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Bills;

/// <summary>Contradictions between the columns of a line, and what was lost before the file was saved: told, never decided.</summary>
internal static partial class BillDoubts
{
    private const int CommonRun = 4;

    private static readonly string[] Texts = ["References", "Part number", "Value", "Package", "Manufacturer", "Description"];

    /// <summary>Everything that is doubtful in a line.</summary>
    /// <param name="row">Its row.</param>
    /// <param name="line">The line.</param>
    /// <param name="sheet">The sheet.</param>
    internal static IReadOnlyList<Complaint> Of(TableRow row, BillLine line, SheetData sheet)
    {
        List<Complaint> doubts = [];
        void Doubt(string column, string wanted, string text) => doubts.Add(row.ComplaintOf(column, wanted, text));
        int placed = ReferenceList.Components(line.References);
        if (line.Quantity is { } quantity && quantity != placed && placed > 0)
        {
            string text = string.Create(CultureInfo.InvariantCulture, $"The quantity is {quantity}, the references are {placed}.");
            doubts.Add(row.ComplaintOf("Quantity", "as many as references", text) with { IsCount = true });
        }

        if (row.Text("Notes") is { } notes && line.Fitted && FittedMarks.IsInside(notes))
        {
            Doubt("Notes", "a mark alone in its cell, or a column Fitted", $"The note \"{notes}\" speaks of not fitting, and what it means for this line cannot be told.");
        }

        if (row.BeyondHeader is { } beyond)
        {
            Doubt("References", "as many fields as headers", $"\"{beyond.Text}\" in column {beyond.Letters} stands right of the last header: a comma without quotes has most likely moved the fields of this row.");
        }

        foreach (string column in Texts)
        {
            if (row.Text(column) is not { } text)
            {
                continue;
            }

            if (text.Contains('\uFFFD', StringComparison.Ordinal))
            {
                Doubt(column, "a text without lost characters", $"A character of \"{text}\" was lost before the file was saved.");
            }
            else if (column is "Value" or "Description" && ResistanceText.LostSign(text) is { } lost)
            {
                Doubt(column, "a resistance such as 4k7", $"The sign after \"{lost}\" was lost before the file was saved; it may have been an ohm sign.");
            }

            if (column is not "Description" and not "Manufacturer" && row.IsDate(column))
            {
                Doubt(column, "a text", $"\"{text}\" is a date: a spreadsheet has most likely made it of a text.");
            }
        }

        if (line.Value is { } value)
        {
            Contradictions(line, value, sheet.DecimalComma, Doubt);
        }

        return doubts;
    }

    private static void Contradictions(BillLine line, string value, bool decimalComma, Action<string, string, string> doubt)
    {
        if (line.ToldResistance is { } resistance && ResistanceText.SaysOhms(value))
        {
            string shown = EngineeringNotation.Format(resistance.Ohms, "ohm");
            if (line.Description is { } description && ResistanceText.OfDescription(description, decimalComma) is { } told
                && Math.Abs(told - resistance.Ohms) > 0.005 * Math.Max(told, resistance.Ohms))
            {
                doubt("Value", "a value and a description that agree", $"The value is {shown}, the description says {EngineeringNotation.Format(told, "ohm")}.");
            }

            if (line.PartNumber is { } number && !ResistanceText.MayMean(number, resistance.Ohms))
            {
                doubt("Value", "a value and a part number that agree", $"The value is {shown}, and the part number \"{number}\" reads as another resistance.");
            }
        }
        else if (line.PartNumber is { } number && IsTypeNumber(value) && IsTypeNumber(number) && !HaveCommonRun(value, number))
        {
            doubt("Value", "a value and a part number that agree", $"The value \"{value}\" and the part number \"{number}\" name different parts.");
        }
    }

    /// <summary>A type number of a semiconductor: letters and at least three digits, no blank (<c>MMBT3904</c>, <c>BC817-25</c>, <c>2SC1815</c>).</summary>
    private static bool IsTypeNumber(string text) => TypeNumber().IsMatch(text);

    /// <summary>True where four letters or digits in a row are the same in both.</summary>
    private static bool HaveCommonRun(string one, string other)
    {
        string a = Plain(one);
        string b = Plain(other);
        for (int i = 0; i + CommonRun <= a.Length; i++)
        {
            if (b.Contains(a.AsSpan(i, CommonRun), StringComparison.Ordinal))
            {
                return true;
            }
        }

        return false;
    }

    private static string Plain(string text) => string.Concat(text.ToUpperInvariant().Where(char.IsAsciiLetterOrDigit));

    [GeneratedRegex(@"^(?:[0-9][SN][A-Z]?[0-9]{3,4}|[A-Z]{2,5}[0-9]{3,5})[A-Z0-9]{0,6}(?:[-/][A-Z0-9]{1,8}){0,2}$", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex TypeNumber();
}
