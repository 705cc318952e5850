using System.Globalization;
using PartCheck.Bills;
using PartCheck.Parts;
using PartCheck.Sheets;

namespace PartCheck.Channels;

/// <summary>Channel rows, bill and part table to channels with every role bound to a part row.</summary>
public static class ChannelBinder
{
    /// <summary>Most readings of a bill that one channel may have.</summary>
    public const int MostReadings = 256;

    /// <summary>Binds every channel.</summary>
    public static IReadOnlyList<Channel> Bind(
        IReadOnlyList<ChannelRow> rows, Bill bill, PartTable parts, IReadOnlyList<LogicPin> pins, ComplaintList complaints)
    {
        ArgumentNullException.ThrowIfNull(rows);
        ArgumentNullException.ThrowIfNull(bill);
        Dictionary<string, BillLine> byReference = new(StringComparer.OrdinalIgnoreCase);
        foreach (BillLine line in bill.Lines)
        {
            foreach (string reference in line.References)
            {
                byReference.TryAdd(reference, line);
            }
        }

        // A bill may list a package (Q1) whose elements (Q1.2) serve, or the elements of one.
        foreach (BillLine line in bill.Lines)
        {
            foreach (string reference in line.References)
            {
                byReference.TryAdd(ElementReference.PackageOf(reference), line);
            }
        }

        foreach (string element in rows.SelectMany(row => RoleNames.Columns.SelectMany(c => row.Placed(c.Role))))
        {
            if (byReference.TryGetValue(ElementReference.PackageOf(element), out BillLine? line))
            {
                byReference.TryAdd(element, line);
            }
        }

        // A row with complaints is not judged and proves nothing about the others.
        ILookup<string, ChannelRow> users = rows
            .Where(row => row.Conditions is not null)
            .SelectMany(row => RoleNames.Columns.SelectMany(c => row.Placed(c.Role)).Distinct(StringComparer.OrdinalIgnoreCase).Select(reference => (reference, row)))
            .ToLookup(use => use.reference, use => use.row, StringComparer.OrdinalIgnoreCase);
        return [.. rows.Select(row => BindOne(row, rows, byReference, users, parts, pins, complaints))];
    }

    private static Channel BindOne(
        ChannelRow row, IReadOnlyList<ChannelRow> all, Dictionary<string, BillLine> bill, ILookup<string, ChannelRow> users, PartTable parts, IReadOnlyList<LogicPin> pins, ComplaintList complaints)
    {
        List<RoleFault> faults = [];
        List<string> missing = [];
        List<Assumption> assumed = [.. row.Assumed];
        Dictionary<BillLine, IReadOnlyList<Part>> choices = new(ReferenceEqualityComparer.Instance);
        Dictionary<string, string> usedBy = new(StringComparer.OrdinalIgnoreCase);
        foreach ((Role role, string column) in RoleNames.Columns)
        {
            foreach (string reference in row.Placed(role))
            {
                if (!usedBy.TryAdd(reference, column))
                {
                    faults.Add(new RoleFault(role, reference, $"{reference} serves as {RoleNames.Spoken(usedBy[reference])} and as {RoleNames.Spoken(column)}.", row.Cells[column]));
                    continue;
                }

                // One part carries the current of one channel: in two it would be judged at half its load.
                if (users[reference].FirstOrDefault(other => other != row) is { } twin)
                {
                    faults.Add(new RoleFault(role, reference, $"{reference} ({RoleNames.Spoken(column)}) serves channel {twin.Name} too.", row.Cells[column]));
                    continue;
                }

                BindReference(row, role, column, reference, bill, parts, choices, faults, missing, assumed);
                if (bill.TryGetValue(reference, out BillLine? line) && choices.TryGetValue(line, out IReadOnlyList<Part>? bound))
                {
                    if (PackageElements.Fault(reference, RoleNames.Spoken(column), bound) is { } fault)
                    {
                        faults.Add(new RoleFault(role, reference, fault, row.Cells[column]));
                    }
                    else if (bound.OfType<Transistor>().MaxBy(p => p.Elements) is { Elements: > 1 } several)
                    {
                        assumed.AddRange(PackageElements.Idle(reference, several, all).Except(assumed));
                    }
                }
            }
        }

        if (row.Conditions is null)
        {
            missing.Insert(0, "a channel row without complaints");
        }

        LogicPin? pin = pins.FirstOrDefault(p => string.Equals(p.Name, row.Logic, StringComparison.OrdinalIgnoreCase));
        List<BoundChannel> readings = [];
        if (faults.TrueForAll(f => f.OfAlternate) && missing.Count == 0 && pin is not null)
        {
            long count = choices.Values.Aggregate(1L, (n, c) => Math.Min(n * c.Count, 1L << 40));
            if (count > MostReadings)
            {
                string text = string.Create(CultureInfo.InvariantCulture, $"The part numbers and alternates on the bill have {count} combinations of rows in the part table for this channel, more than {MostReadings}: name the manufacturers on the bill, or ask for one alternate at a time (--with).");
                complaints.Add(Complaint.At(row.Cell, "Channel", row.Name, "manufacturers on the bill, or fewer alternates", text) with { Channel = row.Name });
                missing.Add("manufacturers on the bill, or fewer alternates");
            }
            else
            {
                foreach (Dictionary<BillLine, Part> reading in Combinations([.. choices]))
                {
                    readings.Add(Reading(row, pin, bill, reading) with { Mix = Mix(row, choices, reading), Neighbours = PackageElements.Neighbours(row, all) });
                }
            }
        }

        return new Channel
        {
            Name = row.Name,
            Cell = row.Cell,
            Readings = readings,
            Missing = missing,
            RoleFaults = faults,
            Assumed = assumed,
            References = [.. RoleNames.Columns.SelectMany(c => row.Placed(c.Role))],
            Derating = row.Conditions?.Derating,
        };
    }

    private static void BindReference(
        ChannelRow row, Role role, string column, string reference, Dictionary<string, BillLine> bill, PartTable parts,
        Dictionary<BillLine, IReadOnlyList<Part>> choices, List<RoleFault> faults, List<string> missing, List<Assumption> assumed)
    {
        void Fault(string text, string cell) => faults.Add(new RoleFault(role, reference, text, cell));
        if (!bill.TryGetValue(reference, out BillLine? line))
        {
            Fault($"{reference} ({RoleNames.Spoken(column)}) is not on the bill.", row.Cells[column]);
            return;
        }

        if (!line.Fitted)
        {
            Fault($"{reference} ({RoleNames.Spoken(column)}) is not fitted: the bill says \"{line.FittedMark?.Value}\".", line.FittedMark?.Cell ?? line.Cell);
            return;
        }

        // Nothing is solved with an LED's row: without it the channel is judged, and the rule that reads it is not verified.
        void Absent(string what)
        {
            if (role == Role.Led)
            {
                choices[line] = [new LedPart { PartNumber = line.PartNumber ?? "no part number", Cell = line.Cell, Missing = what }];
            }
            else if (!missing.Contains(what))
            {
                missing.Add(what);
            }
        }

        if (line.PartNumber is null)
        {
            Absent("part number of " + reference);
            return;
        }

        PartChoice own = PartChoice.Of(row, role, reference, line.PartNumber, line.Manufacturer, parts, assumed);
        if (own.Missing is { } lacking)
        {
            Absent(lacking);
            return;
        }

        if (own.Fault is { } wrong)
        {
            Fault(wrong, own.FaultCell ?? line.Cell);
            return;
        }

        // One purchase fills a line: every reference of it carries the same part, its own or one alternate.
        List<Part> rows = [.. own.Rows];
        foreach (string alternate in AlternatesOf(line).Where(a => parts.Find(a).Count > 0))
        {
            PartChoice other = PartChoice.Of(row, role, reference, alternate, null, parts, assumed);
            rows.AddRange(other.Rows);
            if (other.Rows.Count == 0)
            {
                faults.Add(new RoleFault(role, reference, $"Alternate {alternate}: {other.Fault ?? "its row is not for this mounting."}", other.FaultCell ?? line.Cell)
                {
                    OfAlternate = true,
                    Missing = other.Missing,
                });
            }
        }

        choices[line] = choices.TryGetValue(line, out IReadOnlyList<Part>? earlier) ? [.. rows.Where(r => earlier.Any(e => ReferenceEquals(e, r)))] : rows;
    }

    /// <summary>Alternates of a line, each once, its own part number left out.</summary>
    private static IEnumerable<string> AlternatesOf(BillLine line) => line.Alternates
        .Distinct(StringComparer.OrdinalIgnoreCase).Where(a => !string.Equals(a, line.PartNumber, StringComparison.OrdinalIgnoreCase));

    /// <summary>What a reading takes for the lines that offer several part numbers or manufacturers, in bill order.</summary>
    private static List<MixedLine> Mix(ChannelRow row, IReadOnlyDictionary<BillLine, IReadOnlyList<Part>> choices, Dictionary<BillLine, Part> taken)
    {
        HashSet<string> named = new(RoleNames.Columns.SelectMany(c => row.Of(c.Role)), StringComparer.OrdinalIgnoreCase);
        return [.. choices.Where(c => c.Value.Select(p => (p.PartNumber, p.Manufacturer)).Distinct().Count() > 1)
            .Select(c => new MixedLine(
                [.. c.Key.References.Where(r => named.Contains(r) || named.Any(n => string.Equals(ElementReference.PackageOf(n), r, StringComparison.OrdinalIgnoreCase)))], taken[c.Key].PartNumber, taken[c.Key].Manufacturer,
                !string.Equals(taken[c.Key].PartNumber, c.Key.PartNumber, StringComparison.OrdinalIgnoreCase)))];
    }

    private static BoundChannel Reading(ChannelRow row, LogicPin pin, Dictionary<string, BillLine> bill, Dictionary<BillLine, Part> parts)
    {
        Placement Place(Role role, int leg, string reference)
        {
            BillLine line = bill[reference];
            return new Placement(role, leg, reference, line, parts[line]);
        }

        IReadOnlyList<string> pass = row.Of(Role.Pass);
        IReadOnlyList<string> sense = row.Of(Role.Sense);
        IReadOnlyList<string> averaging = row.Of(Role.Averaging);
        List<Leg> legs = [];
        for (int i = 0; i < pass.Count; i++)
        {
            bool sensed = averaging.Count == 0 || averaging[i] != RoleNames.NotSensed;
            legs.Add(new Leg(
                Place(Role.Pass, i, pass[i]), Place(Role.Sense, i, sense[i]),
                averaging.Count > 0 && RoleNames.IsReference(averaging[i]) ? Place(Role.Averaging, i, averaging[i]) : null, sensed));
        }

        return new BoundChannel
        {
            Name = row.Name,
            Cell = row.Cell,
            Conditions = row.Conditions!,
            Logic = pin,
            Pin = row.Pin,
            Legs = legs,
            Control = Place(Role.Control, -1, row.Of(Role.Control)[0]),
            Feed = Place(Role.Feed, -1, row.Of(Role.Feed)[0]),
            PullDown = row.Of(Role.PullDown) is { Count: > 0 } down ? Place(Role.PullDown, -1, down[0]) : null,
            PullDownAt = row.PullDownAt,
            Leds = [.. row.Of(Role.Led).Select(r => Place(Role.Led, -1, r))],
            ConditionCells = row.Cells,
        };
    }

    private static IEnumerable<Dictionary<BillLine, Part>> Combinations(IReadOnlyList<KeyValuePair<BillLine, IReadOnlyList<Part>>> choices)
    {
        int[] at = new int[choices.Count];
        while (true)
        {
            Dictionary<BillLine, Part> one = new(ReferenceEqualityComparer.Instance);
            for (int i = 0; i < at.Length; i++)
            {
                one[choices[i].Key] = choices[i].Value[at[i]];
            }

            yield return one;
            int digit = 0;
            while (digit < at.Length && ++at[digit] == choices[digit].Value.Count)
            {
                at[digit++] = 0;
            }

            if (digit == at.Length)
            {
                yield break;
            }
        }
    }
}
