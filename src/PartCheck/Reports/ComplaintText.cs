using System.Globalization;
using System.Text;
using PartCheck.Sheets;

namespace PartCheck.Reports;

/// <summary>Complaints as a person reads them.</summary>
internal static class ComplaintText
{
    /// <summary>Appends the list of complaints; nothing where there is none.</summary>
    internal static void Append(StringBuilder text, IReadOnlyList<Complaint> complaints)
    {
        if (complaints.Count == 0)
        {
            return;
        }

        text.Append(CultureInfo.InvariantCulture, $"Complaints ({complaints.Count}): what could not be read\n");
        foreach (Complaint c in complaints)
        {
            Columns80.Wrap(text, "  ", Place(c) + ": " + c.Text, 4);
            if (c.Found is not null || c.Wanted is not null)
            {
                string found = c.Found is null ? string.Empty : $"found \"{c.Found}\"" + (c.Wanted is null ? string.Empty : ", ");
                Columns80.Wrap(text, "    ", found + (c.Wanted is null ? string.Empty : "wanted " + c.Wanted), 6);
            }
        }

        text.Append('\n');
    }

    private static string Place(Complaint c) =>
        string.Join("!", new[] { c.File, c.Sheet, c.Cell }.OfType<string>()) + (c.Column is null ? string.Empty : $" [{c.Column}]");
}
