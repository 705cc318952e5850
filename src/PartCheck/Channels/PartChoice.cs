using PartCheck.Parts;

namespace PartCheck.Channels;

/// <summary>The part rows that one part number offers for one role of a channel, or why it offers none.</summary>
/// <param name="Rows">The rows, in table order.</param>
/// <param name="Missing">Data that is missing; null: none.</param>
/// <param name="Fault">What is wrong with the part in this role, one sentence; null: nothing.</param>
/// <param name="FaultCell">The cell that says so; null: the bill line's.</param>
internal sealed record PartChoice(IReadOnlyList<Part> Rows, string? Missing = null, string? Fault = null, string? FaultCell = null)
{
    /// <summary>Looks a part number up for a role.</summary>
    /// <param name="row">The channel.</param>
    /// <param name="role">The role.</param>
    /// <param name="reference">The reference that plays it.</param>
    /// <param name="number">The part number.</param>
    /// <param name="maker">Its manufacturer; null: any.</param>
    /// <param name="parts">The part table.</param>
    /// <param name="assumed">Where an assumed mounting is listed.</param>
    internal static PartChoice Of(ChannelRow row, Role role, string reference, string number, string? maker, PartTable parts, List<Assumption> assumed)
    {
        IReadOnlyList<Part> found = parts.Find(number);
        if (found.Count == 0)
        {
            return new PartChoice([], "part table row of " + number);
        }

        if (maker is not null)
        {
            found = [.. found.Where(p => p.Manufacturer is null || string.Equals(p.Manufacturer, maker, StringComparison.OrdinalIgnoreCase))];
            if (found.Count == 0)
            {
                return new PartChoice([], $"part table row of {number} by {maker}");
            }
        }

        if (row.Conditions?.Mounting is { } mounting)
        {
            found = [.. found.Where(p => p.Mounting is null || string.Equals(p.Mounting, mounting, StringComparison.OrdinalIgnoreCase))];
            if (found.Count == 0)
            {
                return new PartChoice([], $"part table row of {number} on {mounting}");
            }
        }
        else if (found.Select(p => p.Mounting ?? string.Empty).Distinct(StringComparer.OrdinalIgnoreCase).Count() > 1
            && !assumed.Any(a => a.What == "Mounting" && a.Of == number))
        {
            assumed.Add(new Assumption("Mounting", number, "the worst of its rows"));
        }

        return found.Select(part => Unfit(part, role, reference, number)).FirstOrDefault(f => f is not null) ?? new PartChoice(found);
    }

    private static PartChoice? Unfit(Part part, Role role, string reference, string number)
    {
        string column = RoleNames.Spoken(RoleNames.ColumnOf(role));
        string wanted = role switch { Role.Pass or Role.Control => "a transistor", Role.Led => "an LED", _ => "a resistor" };
        string kind = part switch { Transistor => "a transistor", LedPart => "an LED", _ => "a resistor" };
        return part switch
        {
            RefusedPart refused => new PartChoice([], Fault: $"{number} is refused as {column}: {refused.Reason}."),
            _ when kind != wanted => new PartChoice([], Fault: $"{reference} ({column}) is {kind}: {wanted} is wanted."),
            ResistorPart { Resistance.Value.Ohms: 0 } when role != Role.Averaging => new PartChoice(
                [], Fault: $"{reference} ({column}) has zero ohm: only averaging may.", FaultCell: part.Cell),
            _ => null,
        };
    }
}
