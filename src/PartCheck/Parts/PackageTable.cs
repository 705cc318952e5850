using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>How two package names stand to each other.</summary>
public enum PackageRelation
{
    /// <summary>Two packages, or a name that the table does not know: the land patterns are not known to agree.</summary>
    Different,

    /// <summary>Near-equivalent outlines whose land patterns are to be compared.</summary>
    Near,

    /// <summary>Two names of one outline.</summary>
    Same,
}

/// <summary>
/// Names of packages and the lead orders seen in them: <c>partdata/packages.csv</c>, each row with its source. A row without
/// Alias is the package itself.
/// </summary>
public static class PackageTable
{
    private const string Resource = "partdata/packages.csv";

    private static readonly ColumnSpec[] Columns =
    [
        new("Package", ColumnKind.Text, Required: true),
        new("Alias", ColumnKind.Text),
        new("Relation", ColumnKind.Text),
        new("Leads read", ColumnKind.Text),
        new("Orders", ColumnKind.Text),
        new("Source", ColumnKind.Text),
    ];

    private static readonly IReadOnlyList<PackageRow> Rows = Load();

    private static readonly Dictionary<string, string> Names = Rows.Where(r => r.Relation != PackageRelation.Near)
        .Select(r => (Name: PackageName.Plain(r.Alias ?? r.Package), r.Package)).Distinct()
        .ToDictionary(n => n.Name, n => n.Package, StringComparer.Ordinal);

    /// <summary>How two package names of part table rows stand to each other.</summary>
    /// <param name="one">A name.</param>
    /// <param name="other">Another.</param>
    public static PackageRelation Relation(string one, string other)
    {
        string a = Known(one);
        string b = Known(other);
        if (string.Equals(PackageName.Plain(a), PackageName.Plain(b), StringComparison.Ordinal))
        {
            return PackageRelation.Same;
        }

        bool near = Rows.Any(r => r.Relation == PackageRelation.Near && r.Alias is { } alias
            && ((Same(r.Package, a) && Same(Known(alias), b)) || (Same(r.Package, b) && Same(Known(alias), a))));
        return near ? PackageRelation.Near : PackageRelation.Different;
    }

    /// <summary>The table's own name of a package; the text itself where the table does not know it.</summary>
    /// <param name="name">A package name.</param>
    public static string Known(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        return Names.GetValueOrDefault(PackageName.Plain(name), name);
    }

    /// <summary>True where the leads of a package are read by position, since makers number it in both directions.</summary>
    /// <param name="name">A package name.</param>
    public static bool ReadByPosition(string name) => Own(name)?.ByPosition == true;

    /// <summary>Lead orders seen in a package; empty: none is known. Others may occur.</summary>
    /// <param name="name">A package name.</param>
    public static IReadOnlyList<LeadOrder> OrdersSeen(string name) => Own(name)?.Orders ?? [];

    private static PackageRow? Own(string name)
    {
        string known = Known(name);
        return Rows.FirstOrDefault(r => r.Alias is null && Same(r.Package, known));
    }

    private static bool Same(string one, string other) => string.Equals(PackageName.Plain(one), PackageName.Plain(other), StringComparison.Ordinal);

    private static List<PackageRow> Load()
    {
        ComplaintList complaints = new();
        Table? table = SheetFile.Embedded(Resource, complaints) is { } sheet
            ? Table.Find(sheet, "Packages", Columns, ColumnSpellings.Load(null, complaints), complaints) : null;
        if (table is null || complaints.Items.Count > 0)
        {
            throw new InvalidOperationException($"{Resource} cannot be read: {string.Join(" ", complaints.Items.Select(c => c.Text))}");
        }

        return [.. table.Rows.Select(Row)];
    }

    private static PackageRow Row(TableRow row)
    {
        string package = row.Text("Package") ?? throw new InvalidOperationException($"{Resource}: a row names no package.");
        PackageRelation relation = row.Text("Relation") switch
        {
            null or "same" => PackageRelation.Same,
            "near" => PackageRelation.Near,
            string other => throw new InvalidOperationException($"{Resource}: the relation {other} is not known."),
        };
        LeadOrder[] orders = [.. (row.Text("Orders") ?? string.Empty).Split(';', StringSplitOptions.RemoveEmptyEntries)
            .Select(o => LeadOrder.Parse(o, 1) ?? throw new InvalidOperationException($"{Resource}: {o} is no order of leads."))];
        return new PackageRow(package, row.Text("Alias"), relation, row.Text("Leads read") == "position", orders);
    }

    private sealed record PackageRow(string Package, string? Alias, PackageRelation Relation, bool ByPosition, IReadOnlyList<LeadOrder> Orders);
}
