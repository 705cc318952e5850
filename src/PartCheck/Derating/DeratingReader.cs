using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Derating;

/// <summary>Cells to derating tables.</summary>
public static class DeratingReader
{
    private static readonly string[] KnownRules =
    [
        "vce", "vcb", "ic", "power", "junction", "soa", "stability", "sharing", "r-power", "r-voltage", "r-film", "led-current",
        "current", "headroom", "drive", "pin-current", "off",
    ];

    private const double CoolestZero = 273.15;
    private const double HottestZero = 623.15;

    private static readonly string[] ByLimit = ["drive", "sharing"];
    private static readonly string[] ByTemperature = ["junction", "r-film"];
    private static readonly string[] NotDerated = ["current", "headroom", "off"];

    /// <summary>Columns of the table.</summary>
    public static IReadOnlyList<ColumnSpec> Columns { get; } =
    [
        new("Name", ColumnKind.Text, Required: true),
        new("Rule", ColumnKind.Text, Required: true),
        new("Kind", ColumnKind.Text),
        new("Style", ColumnKind.Text),
        new("Factor", ColumnKind.Number, 0, 1),
        new("Cap", ColumnKind.Temperature, 173, 623),
        new("Offset", ColumnKind.TemperatureDelta, 0, 200),
        new("Zero temperature", ColumnKind.Text),
        new("Limit", ColumnKind.Number, 0, 1000),
        new("Source", ColumnKind.Text),
        new("Note", ColumnKind.Text),
    ];

    /// <summary>Every table of a sheet, rows grouped by Name, in the order in which the names appear.</summary>
    public static IReadOnlyList<DeratingTable> Read(SheetData sheet, ColumnSpellings spellings, ComplaintList complaints)
    {
        Table? table = Table.Find(sheet, "Derating", Columns, spellings, complaints);
        if (table is null)
        {
            return [];
        }

        List<(string Name, string? Note, DeratingRow Row, TableRow Line)> rows = [];
        List<string> names = [];
        foreach (TableRow line in table.Rows)
        {
            if (line.Text("Name") is { } name && !names.Contains(name, StringComparer.OrdinalIgnoreCase))
            {
                names.Add(name);
            }

            if (ReadRow(line) is { } row)
            {
                if (rows.Find(r => Same(r.Name, line.Text("Name")) && Same(r.Row.Rule, row.Rule) && Same(r.Row.Kind, row.Kind) && Same(r.Row.Style, row.Style)) is { Line: not null } twin)
                {
                    line.Complain("Rule", "one row for a rule, kind and style", $"This row says again what row {twin.Line.Row} says for the same rule, kind and style: keep one.");
                    continue;
                }

                rows.Add((line.Text("Name")!, line.Text("Note"), row, line));
            }
        }

        // A row that cannot be read leaves a rule without its derating: nothing that such a table judges is verified.
        bool Broken(string name) => table.Rows.Any(l => l.HasComplaints && (l.Text("Name") is null || Same(l.Text("Name"), name)));
        return [.. names.Select(name => (Name: name, Rows: rows.Where(r => Same(r.Name, name)).ToList()))
            .Select(g => new DeratingTable(g.Name, g.Rows.Select(r => r.Note).FirstOrDefault(n => n is not null), [.. g.Rows.Select(r => r.Row)]) { Unknown = Broken(g.Name) })];
    }

    private static DeratingRow? ReadRow(TableRow line)
    {
        string? rule = line.Text("Rule");
        if (line.Text("Name") is null)
        {
            line.Complain("Name", "the name of a derating table", "The row names no derating table.");
        }

        if (rule is null || !KnownRules.Contains(rule, StringComparer.OrdinalIgnoreCase))
        {
            line.Complain("Rule", "one of " + string.Join(", ", KnownRules), $"The rule \"{rule}\" is not known.");
        }

        string? kind = line.Text("Kind");
        if (kind is not null && !Same(kind, "npn") && !Same(kind, "resistor") && !Same(kind, "led"))
        {
            line.Complain("Kind", "npn, resistor or led", $"The kind \"{kind}\" is not known here.");
        }

        string? zero = line.Text("Zero temperature");
        ZeroTemperature at = ZeroTemperature.Rated;
        Temperature? zeroAt = null;
        if (Same(zero, "parallel"))
        {
            at = ZeroTemperature.Parallel;
        }
        else if (zero is not null && !Same(zero, "rated") && line.Part("Zero temperature", zero, ColumnKind.Temperature) is { } kelvins)
        {
            if (kelvins is < CoolestZero or > HottestZero)
            {
                line.Complain("Zero temperature", "rated, parallel or a temperature of 0 to 350 degC", $"A curve that reaches zero at {zero} is not plausible.");
            }
            else
            {
                at = ZeroTemperature.Fixed;
                zeroAt = Temperature.FromKelvins(kelvins);
            }
        }

        Cited<double>? factor = line.Number("Factor");
        Cited<double>? cap = line.Number("Cap");
        Cited<double>? offset = line.Number("Offset");
        Cited<double>? limit = line.Number("Limit");
        CheckUse(line, rule, limit);
        return line.HasComplaints ? null : new DeratingRow
        {
            Rule = rule!.ToLowerInvariant(),
            Kind = kind,
            Style = line.Text("Style"),
            Factor = factor?.Value ?? 1,
            Cap = cap is null ? null : Temperature.FromKelvins(cap.Value),
            Offset = TemperatureDelta.FromKelvins(offset?.Value ?? 0),
            Zero = at,
            ZeroAt = zeroAt,
            Limit = limit?.Value,
            Source = line.Text("Source") ?? "no source given",
            Cell = line.Cite("Rule"),
        };
    }

    /// <summary>A number in a column that its rule does not read would derate nothing, silently.</summary>
    private static void CheckUse(TableRow line, string? rule, Cited<double>? limit)
    {
        bool Is(string[] rules) => rules.Contains(rule, StringComparer.OrdinalIgnoreCase);
        void Unread(string column, string wanted) =>
            line.Complain(column, wanted, $"The rule {rule} does not read {column}: this cell would change nothing.");

        if (Is(NotDerated))
        {
            line.Complain("Rule", "a rule that derates a rating", $"The rule {rule} is held to the channel's own limits: nothing of it is derated.");
            return;
        }

        if (limit is not null && !Is(ByLimit))
        {
            Unread("Limit", "a Factor, for a share of a rating");
        }

        if (limit is null && Is(ByLimit) && line.Text("Limit") is null or "-")
        {
            line.Complain("Limit", "a limit", $"The rule {rule} reads its limit, and the row gives none.");
        }

        if (limit is { Value: <= 1 } && Same(rule, "sharing"))
        {
            line.Complain("Limit", "a ratio above 1", "The limit of sharing is a ratio to the mean: it is above 1.");
        }

        if (limit is { Value: < 1 } && Same(rule, "drive"))
        {
            line.Complain("Limit", "a factor of at least 1", "A drive factor below 1 asks for less current than the legs take.");
        }

        if (line.Number("Factor") is { Value: not 1 } && Is(ByLimit))
        {
            Unread("Factor", "a Limit");
        }

        foreach (string column in (ReadOnlySpan<string>)["Cap", "Offset"])
        {
            if (line.Number(column) is { Value: not 0 } && !Is(ByTemperature))
            {
                Unread(column, "a blank cell");
            }
        }

        if (line.Text("Zero temperature") is not null && !Same(rule, "r-power"))
        {
            Unread("Zero temperature", "a blank cell");
        }
    }

    private static bool Same(string? a, string? b) => string.Equals(a, b, StringComparison.OrdinalIgnoreCase);
}
