using System.Reflection;
using PartCheck.Sheets;

namespace PartCheck.Derating;

/// <summary>The derating tables that travel inside the tool, one file each under <c>partdata/derating/</c>.</summary>
public static class DeratingLibrary
{
    private const string Prefix = "partdata/derating/";

    /// <summary>Their names, in ordinal order.</summary>
    public static IReadOnlyList<string> Names { get; } =
        [.. typeof(DeratingLibrary).Assembly.GetManifestResourceNames()
            .Where(n => n.StartsWith(Prefix, StringComparison.Ordinal) && n.EndsWith(".csv", StringComparison.Ordinal))
            .Select(n => n[Prefix.Length..^4]).Order(StringComparer.Ordinal)];

    /// <summary>The table of a name; null where there is none.</summary>
    public static DeratingTable? Named(string name)
    {
        string? found = Names.FirstOrDefault(n => string.Equals(n, name, StringComparison.OrdinalIgnoreCase));
        if (found is null)
        {
            return null;
        }

        ComplaintList complaints = new();
        SheetData sheet = SheetFile.Embedded($"{Prefix}{found}.csv", complaints)
            ?? throw new InvalidOperationException($"The embedded table {found} cannot be read.");
        DeratingTable? table = DeratingReader.Read(sheet, ColumnSpellings.Load(null, complaints), complaints).SingleOrDefault();
        return complaints.Items.Count == 0 && table is not null
            ? table
            : throw new InvalidOperationException($"The embedded table {found} has complaints: {string.Join(" ", complaints.Items.Select(c => c.Text))}");
    }
}
