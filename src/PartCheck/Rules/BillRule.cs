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

    private const string Source = "the bill and the part table themselves";

    /// <summary>Judges a bill.</summary>
    public static IReadOnlyList<Finding> Judge(Bill bill, PartTable parts, IReadOnlyList<Channel> channels)
    {
        ArgumentNullException.ThrowIfNull(bill);
        ArgumentNullException.ThrowIfNull(parts);
        ArgumentNullException.ThrowIfNull(channels);
        List<Finding> findings = [];
        foreach (BillLine line in bill.Lines)
        {
            List<string> serves = [.. channels.Where(c => c.References.Any(r => line.References.Contains(r, StringComparer.OrdinalIgnoreCase))).Select(c => c.Name)];
            if (serves.Count > 0)
            {
                findings.Add(JudgeLine(line, parts, serves));
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
                    Verdict = Verdict.Nonconforming,
                    Source = Source,
                    Cell = fault.Cell,
                    Text = fault.Text,
                });
            }
        }

        return findings;
    }

    private static Finding JudgeLine(BillLine line, PartTable parts, List<string> serves)
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

        if (line.Quantity is { } quantity && quantity != line.Placed)
        {
            wrong.Add(string.Create(CultureInfo.InvariantCulture, $"the quantity is {quantity}, the references are {line.Placed}"));
        }

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
            if (line.Package is { } package && row.Package is { } tabled && !PackageName.Agrees(package, tabled))
            {
                wrong.Add($"the bill's package is {package}, the part table's {tabled}");
            }

            if (row is ResistorPart resistor && line.Resistance is { } value && Math.Abs(value.Ohms - resistor.Resistance.Value.Ohms) > 1e-6 * value.Ohms)
            {
                wrong.Add($"the bill's value is {EngineeringNotation.Format(value.Ohms, "ohm")}, the part table's {EngineeringNotation.Format(resistor.Resistance.Value.Ohms, "ohm")}");
                (actual, allowed, unit) = (value.Ohms, resistor.Resistance.Value.Ohms, "ohm");
            }
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
        };
    }

    private static string Sentence(string text) => char.ToUpperInvariant(text[0]) + text[1..] + ".";
}
