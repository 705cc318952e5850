using System.Globalization;
using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Rules;

/// <summary>
/// The bill itself, exact: references and quantity agree; every role's reference stands on the bill once and is fitted;
/// package, kind and resistance agree with the part table. Lines that serve no channel are left in peace.
/// </summary>
public static class BillRule
{
    /// <summary>Identifier.</summary>
    public const string Id = "bill";

    /// <summary>What the rule demands, one line.</summary>
    public const string Title = "Quantity, fitting, package, kind and resistance of each line agree with references and part table";

    /// <summary>Where the rule comes from.</summary>
    public const string Source = "the bill and the part table themselves";

    /// <summary>Judges a bill.</summary>
    public static IReadOnlyList<Finding> Judge(Bill bill, PartTable parts, IReadOnlyList<Channel> channels)
    {
        ArgumentNullException.ThrowIfNull(bill);
        ArgumentNullException.ThrowIfNull(parts);
        ArgumentNullException.ThrowIfNull(channels);
        List<Finding> findings = [];
        foreach (BillLine line in bill.Lines)
        {
            List<string> serves = [.. channels.Where(c => c.References.Any(line.Holds)).Select(c => c.Name)];
            if (serves.Count > 0)
            {
                findings.Add(JudgeLine(line, bill, parts, serves));
            }
        }

        foreach (Channel channel in channels)
        {
            foreach (RoleFault fault in channel.RoleFaults)
            {
                findings.Add(new Finding
                {
                    Channel = channel.Name,
                    Rule = Id,
                    Reference = fault.Reference,
                    Verdict = fault.Missing is null ? Verdict.Nonconforming : Verdict.NotVerified,
                    Source = Source,
                    Cell = fault.Cell,
                    Text = fault.Text,
                    Missing = fault.Missing is { } lacking ? [lacking] : [],
                    Derivation = new Derivation().Note(fault.Text, fault.Cell),
                });
            }
        }

        return findings;
    }

    private static Finding JudgeLine(BillLine line, Bill bill, PartTable parts, List<string> serves)
    {
        List<string> wrong = [];
        List<string> missing = [];
        double? actual = null;
        double? allowed = null;
        string? unit = null;
        if (line.HasComplaints)
        {
            missing.Add("a bill line without complaints");
        }

        Derivation steps = new();
        int placed = ReferenceList.Components(line.References);
        steps.Given("references", placed, string.Empty, "components to place: " + string.Join(", ", line.References), line.Cell);
        if (line.Quantity is { } stated)
        {
            steps.Given("quantity", stated, string.Empty, "Quantity of the line", line.Cell).Step("surplus", "quantity - references", string.Empty, "must be 0");
        }
        else
        {
            steps.Note("The line gives no quantity.");
        }

        if (line.Quantity is { } quantity && quantity != placed)
        {
            wrong.Add(string.Create(CultureInfo.InvariantCulture, $"the quantity is {quantity}, the references are {placed}"));
        }

        wrong.AddRange(SplitPackages(line, bill));

        IReadOnlyList<Part> rows = line.PartNumber is null ? [] : parts.Find(line.PartNumber);
        if (line.Manufacturer is { } maker && rows.Count > 0)
        {
            IReadOnlyList<Part> byMaker = [.. rows.Where(r => r.Manufacturer is null || string.Equals(r.Manufacturer, maker, StringComparison.OrdinalIgnoreCase))];
            if (byMaker.Count == 0)
            {
                missing.Add($"part table row of {line.PartNumber} by {maker}");
            }

            rows = byMaker;
        }
        else if (rows.Count == 0)
        {
            missing.Add(line.PartNumber is null ? "part number of " + string.Join(", ", line.References) : "part table row of " + line.PartNumber);
        }

        foreach (Part row in rows)
        {
            Compare(steps, line, row);
            wrong.AddRange(Disagreements(line, row, "the part table's"));
            if (row is ResistorPart resistor && Differs(line, resistor))
            {
                (actual, allowed, unit) = (line.Resistance!.Value.Ohms, resistor.Resistance.Value.Ohms, "ohm");
            }
        }

        foreach (string alternate in line.Alternates)
        {
            IReadOnlyList<Part> others = parts.Find(alternate);
            if (others.Count == 0)
            {
                missing.Add("part table row of " + alternate);
            }

            foreach (Part other in others)
            {
                Compare(steps, line, other);
            }

            wrong.AddRange(others.SelectMany(other => Disagreements(line, other, $"that of the alternate {other.PartNumber}")));
        }

        return new Finding
        {
            Rule = Id,
            References = line.References,
            Channels = serves,
            PartNumber = line.PartNumber,
            Manufacturer = line.Manufacturer,
            Actual = actual,
            Allowed = allowed,
            Unit = unit,
            Verdict = wrong.Count > 0 ? Verdict.Nonconforming : missing.Count > 0 ? Verdict.NotVerified : Verdict.Conforms,
            Source = Source,
            Cell = line.Cell,
            Text = wrong.Count == 0 ? null : Sentence(string.Join("; ", wrong.Distinct(StringComparer.Ordinal))),
            Missing = wrong.Count > 0 ? [] : missing,
            Derivation = steps,
        };
    }

    /// <summary>Where a line and a part row disagree in package or resistance.</summary>
    private static IEnumerable<string> Disagreements(BillLine line, Part row, string whose)
    {
        if (line.Package is { } package && row.Package is { } tabled && !PackageName.Agrees(package, tabled))
        {
            yield return $"the bill's package is {package}, {whose} {tabled}";
        }

        if (row is Transistor transistor && line.References.FirstOrDefault(r => ElementReference.ElementOf(r) is { } n && (n > transistor.Elements || transistor.Elements == 1)) is { } element)
        {
            yield return string.Create(CultureInfo.InvariantCulture, $"{element} names an element that the part does not have, {whose} Elements are {transistor.Elements}");
        }

        if (row is ResistorPart resistor && Differs(line, resistor))
        {
            yield return $"the bill's value is {EngineeringNotation.Format(line.Resistance!.Value.Ohms, "ohm")}, {whose} {EngineeringNotation.Format(resistor.Resistance.Value.Ohms, "ohm")}";
        }
    }

    private static bool Differs(BillLine line, ResistorPart resistor) =>
        line.Resistance is { } value && Math.Abs(value.Ohms - resistor.Resistance.Value.Ohms) > 1e-6 * value.Ohms;

    /// <summary>Writes down what a line is held to in one row of the part table.</summary>
    private static void Compare(Derivation steps, BillLine line, Part row)
    {
        steps.Note($"Part table row of {row.PartNumber}{(row.Manufacturer is { } maker ? " by " + maker : string.Empty)}: package {row.Package ?? "not given"}; the bill says {line.Package ?? "nothing"}.", row.Cell);
        if (row is ResistorPart resistor && line.Resistance is { } value)
        {
            steps.Note($"Resistance {EngineeringNotation.Format(resistor.Resistance.Value.Ohms, "ohm", 6)}; the bill says {EngineeringNotation.Format(value.Ohms, "ohm", 6)}.", resistor.Resistance.Cell);
        }
    }

    /// <summary>A package is bought once: its elements stand on one line, and not beside the package itself.</summary>
    private static IEnumerable<string> SplitPackages(BillLine line, Bill bill)
    {
        foreach (string package in line.References.Where(r => ElementReference.ElementOf(r) is not null).Select(ElementReference.PackageOf).Distinct(StringComparer.OrdinalIgnoreCase))
        {
            bool IsOf(string reference) => string.Equals(ElementReference.PackageOf(reference), package, StringComparison.OrdinalIgnoreCase);
            if (line.References.Contains(package, StringComparer.OrdinalIgnoreCase))
            {
                yield return $"{package} stands there as a whole and by elements";
            }

            if (bill.Lines.FirstOrDefault(other => other != line && other.References.Any(IsOf)) is { } twin)
            {
                yield return $"{package} stands on another line, too ({twin.Cell})";
            }
        }
    }

    private static string Sentence(string text) => char.ToUpperInvariant(text[0]) + text[1..] + ".";
}
