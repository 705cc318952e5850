using System.Globalization;
using System.Text.RegularExpressions;
using PartCheck.Bills;
using Xunit;

namespace PartCheck.Tests.Bills;

/// <summary>
/// Where a folder of real bills stands beside the repository, every one of them is read, and the resistors are counted against what
/// a person counted in it. The folder is test input only.
/// </summary>
public partial class RealBillsTests
{
    [Fact]
    public void EveryRealBillIsReadAsAPersonCountedIt()
    {
        if (FolderUp() is not { } folder)
        {
            Assert.Skip("No folder shared/wild-boms stands beside the repository.");
            return;
        }

        List<string> wrong = [];
        int counted = 0;
        foreach ((string file, string text) in Entries(File.ReadAllText(Path.Combine(folder, "INDEX.md"))))
        {
            BillReading reading = BillFile.Read(Path.Combine(folder, file), null, null);
            int header = int.Parse(HeaderRow().Match(text).Groups[1].Value, CultureInfo.InvariantCulture);
            if (text.Contains("no designators", StringComparison.Ordinal))
            {
                // A list without designators is refused, and never an empty bill.
                Check(file, "a refusal", true, reading.Bill is null && reading.Complaints.Count > 0, wrong);
                continue;
            }

            List<BillLine> lines = [.. reading.Bill?.Lines ?? []];
            Check(file, "header row", header, reading.Bill?.Tables[0].HeaderRow ?? 0, wrong);
            Match truth = Resistors().Match(text);
            int resistors = int.Parse(truth.Groups[1].Value, CultureInfo.InvariantCulture) + (NotCounted().IsMatch(text) ? 1 : 0);
            Check(file, "resistors", resistors, lines.SelectMany(l => l.References).Count(r => Resistor().IsMatch(r)), wrong);
            counted++;
            if (Transistor().Match(text) is { Success: true } transistor)
            {
                string type = transistor.Groups[1].Value;
                bool there = lines.Any(l => $"{l.PartNumber} {l.Value} {l.Description}".Contains(type, StringComparison.OrdinalIgnoreCase));
                Check(file, type, true, there, wrong);
            }

            if (text.Contains("qty mismatch", StringComparison.Ordinal) || text.Contains("with qty", StringComparison.Ordinal))
            {
                Check(file, "a quantity told", true, reading.Complaints.Any(c => c.IsCount), wrong);
            }

            if (text.Contains("mixed in one file", StringComparison.Ordinal) || text.Contains("contradicts value", StringComparison.Ordinal))
            {
                Check(file, "complaints", true, reading.Complaints.Count > 0, wrong);
            }
        }

        Assert.True(wrong.Count == 0, string.Join("\n", wrong));
        Assert.True(counted >= 30, $"only {counted} bills have a count to compare with");
    }

    private static void Check<T>(string file, string what, T wanted, T got, List<string> wrong)
    {
        if (!EqualityComparer<T>.Default.Equals(wanted, got))
        {
            wrong.Add($"{file}: {what}: counted {wanted}, read {got}");
        }
    }

    private static string? FolderUp()
    {
        for (DirectoryInfo? at = new(AppContext.BaseDirectory); at is not null; at = at.Parent)
        {
            string candidate = Path.Combine(at.FullName, "shared", "wild-boms");
            if (File.Exists(Path.Combine(candidate, "INDEX.md")))
            {
                return candidate;
            }
        }

        return null;
    }

    private static IEnumerable<(string File, string Text)> Entries(string index) =>
        index.Split("\n## ").Skip(1).Select(entry => (entry[..entry.IndexOf('\n', StringComparison.Ordinal)].Trim(), entry));

    [GeneratedRegex("header row ([0-9]+)")]
    private static partial Regex HeaderRow();

    [GeneratedRegex("resistors (?:v[0-9]+: )?([0-9]+)")]
    private static partial Regex Resistors();

    // One more stands under R that the person left out of the count.
    [GeneratedRegex(@"resistors [0-9]+ fixed \+ R[0-9]+ trimmer|\(R[0-9]+ = varistor[^)]*not counted")]
    private static partial Regex NotCounted();

    [GeneratedRegex("^R[0-9]")]
    private static partial Regex Resistor();

    [GeneratedRegex(@"BJT [1-9][^;\n]*?[\s(=]((?:2N|2SC|BC|MMBT|MBT|S8)[A-Z]*[0-9]{3,4})")]
    private static partial Regex Transistor();
}
