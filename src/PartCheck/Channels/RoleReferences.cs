using System.Globalization;
using PartCheck.Bills;
using PartCheck.Sheets;

namespace PartCheck.Channels;

/// <summary>The references of a channel's roles: from its own columns, or from the bill's columns Channel and Role.</summary>
internal static class RoleReferences
{
    private static readonly Role[] ByLeg = [Role.Pass, Role.Sense];

    /// <summary>References by role, legs in order; what is missing, contradicts or does not count up is a complaint.</summary>
    internal static Dictionary<Role, IReadOnlyList<string>> Read(TableRow row, string name, Bill? bill)
    {
        Dictionary<Role, List<string>> onBill = OnBill(row, name, bill);
        Dictionary<Role, IReadOnlyList<string>> references = [];
        foreach ((Role role, string column) in RoleNames.Columns)
        {
            if (row.Text(column) is { } text)
            {
                if (ReferenceList.Read(text, out IReadOnlyList<string> list) is { } wrong)
                {
                    row.Complain(column, "references such as Q1, Q2", wrong);
                }

                references[role] = role == Role.Averaging ? list : WithoutDash(row, column, list);
                if (onBill.TryGetValue(role, out List<string>? other)
                    && !references[role].Where(RoleNames.IsReference).ToHashSet(StringComparer.OrdinalIgnoreCase).SetEquals(other))
                {
                    row.Complain(
                        column, "references that agree with the bill's column Role",
                        $"The channel's {RoleNames.Spoken(column)} is {text} here and {string.Join(", ", other)} by the bill's column Role.");
                }
            }
            else if (onBill.TryGetValue(role, out List<string>? byBill))
            {
                references[role] = byBill;
            }
        }

        foreach (Role role in (ReadOnlySpan<Role>)[Role.Pass, Role.Sense, Role.Control, Role.Feed])
        {
            if (!references.TryGetValue(role, out IReadOnlyList<string>? list) || list.Count == 0)
            {
                string column = RoleNames.ColumnOf(role);
                row.Complain(column, "references", $"The channel has no {column.ToLowerInvariant()}.");
            }
        }

        CheckLegs(row, references);
        if (references.GetValueOrDefault(Role.Led)?.FirstOrDefault(r => r.All(char.IsAsciiDigit)) is { } number)
        {
            row.Complain("LED", "references such as D1-D6", $"\"{number}\" is no reference: LED names the load's LEDs on the bill; how many stand in series goes into LEDs.");
        }

        return references;
    }

    /// <summary>What the bill's columns Channel and Role give the channel, in bill order.</summary>
    private static Dictionary<Role, List<string>> OnBill(TableRow row, string name, Bill? bill)
    {
        Dictionary<Role, List<string>> references = [];
        foreach (BillLine line in bill?.Lines.Where(l => string.Equals(l.Channel, name, StringComparison.OrdinalIgnoreCase)) ?? [])
        {
            if (RoleNames.Of(line.Role) is { } role)
            {
                references.TryAdd(role, []);
                references[role].AddRange(line.References);
            }
            else if (line.Role is not null)
            {
                row.Complain(
                    "Channel", "one of " + string.Join(", ", RoleNames.Columns.Select(c => RoleNames.Spoken(c.Column))),
                    $"The bill gives {string.Join(", ", line.References)} the role \"{line.Role}\" in this channel, which is not known ({line.Cell}).");
            }
        }

        return references;
    }

    /// <summary>A dash alone is a blank cell; beside references it means nothing, since only averaging may leave a leg out.</summary>
    private static IReadOnlyList<string> WithoutDash(TableRow row, string column, IReadOnlyList<string> list)
    {
        if (list.Contains("-") && list.Any(r => r != "-"))
        {
            row.Complain(column, "references", $"A dash stands among the references of {column.ToLowerInvariant()}: only averaging may leave a leg out.");
        }

        return [.. list.Where(r => r != "-")];
    }

    private static void CheckLegs(TableRow row, Dictionary<Role, IReadOnlyList<string>> references)
    {
        int legs = references.GetValueOrDefault(Role.Pass)?.Count ?? 0;
        string Count(int n, string what) => string.Create(CultureInfo.InvariantCulture, $"{n} {what}");
        if (legs > 8)
        {
            row.Complain("Pass", "one to eight legs", $"The channel has {Count(legs, "legs")}; more than eight are not solved.");
        }

        foreach (Role role in ByLeg)
        {
            int count = references.GetValueOrDefault(role)?.Count ?? 0;
            if (count != legs && count > 0 && legs > 0)
            {
                row.Complain(RoleNames.ColumnOf(role), Count(legs, "references"), $"{Count(legs, "pass transistors")} need as many sense resistors, not {Count(count, "of them")}.");
            }
        }

        foreach (Role role in (ReadOnlySpan<Role>)[Role.Control, Role.Feed, Role.PullDown])
        {
            if (references.GetValueOrDefault(role) is { Count: > 1 } many)
            {
                row.Complain(RoleNames.ColumnOf(role), "one reference", $"A channel has one {RoleNames.ColumnOf(role).ToLowerInvariant()}, not {Count(many.Count, "of them")}.");
            }
        }

        IReadOnlyList<string> averaging = references.GetValueOrDefault(Role.Averaging) ?? [];
        if (averaging.Count == 0)
        {
            if (legs > 1)
            {
                row.Complain("Averaging", Count(legs, "references"), "Legs that share a control transistor need an averaging resistor each (or - for a leg that is not sensed, or direct for the only one that is).");
            }
        }
        else if (averaging.Count != legs && legs > 0)
        {
            row.Complain("Averaging", Count(legs, "references"), $"{Count(legs, "legs")} need as many averaging resistors (or - or direct), not {Count(averaging.Count, "of them")}.");
        }
        else if (averaging.All(a => a == RoleNames.NotSensed))
        {
            row.Complain("Averaging", "at least one leg sensed", "The control transistor senses no leg: nothing limits the current.");
        }
        else if (averaging.Any(RoleNames.IsDirect) && averaging.Count(a => a != RoleNames.NotSensed) > 1)
        {
            row.Complain("Averaging", "an averaging resistor for each leg that is sensed", "Only a leg that the control senses alone may be joined to it directly: with several, nothing averages them.");
        }
    }
}
