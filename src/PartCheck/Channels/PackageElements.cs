using System.Globalization;
using PartCheck.Bills;
using PartCheck.Parts;

namespace PartCheck.Channels;

/// <summary>A transistor of the same package that serves another channel.</summary>
/// <param name="Own">Reference in this channel.</param>
/// <param name="Other">Reference in the other one.</param>
/// <param name="Channel">The other channel's name.</param>
public sealed record ElementNeighbour(string Own, string Other, string Channel);

/// <summary>Packages of several transistors: each element serves on its own, and who sits beside it.</summary>
internal static class PackageElements
{
    private static readonly Role[] Transistors = [Role.Pass, Role.Control];

    /// <summary>What is wrong with a reference as an element of its part; null: nothing.</summary>
    internal static string? Fault(string reference, string column, IReadOnlyList<Part> rows)
    {
        int? element = ElementReference.ElementOf(reference);
        foreach (Transistor part in rows.OfType<Transistor>())
        {
            if (element is null && part.Elements > 1)
            {
                return string.Create(
                    CultureInfo.InvariantCulture, $"{reference} ({column}) is a package of {part.Elements} transistors: name the element, {reference}.1 to {reference}.{part.Elements}.");
            }

            if (element > part.Elements || (element is not null && part.Elements == 1))
            {
                return string.Create(
                    CultureInfo.InvariantCulture,
                    $"{reference} ({column}) names element {element}, and {part.PartNumber} has {part.Elements} in a package (Elements of the part table).");
            }
        }

        return null;
    }

    /// <summary>Elements of the row's packages that serve other channels.</summary>
    internal static List<ElementNeighbour> Neighbours(ChannelRow row, IReadOnlyList<ChannelRow> all) =>
        [.. Elements(row).SelectMany(own => all.Where(other => other != row).SelectMany(other => Elements(other)
            .Where(theirs => !Same(own, theirs) && Same(ElementReference.PackageOf(own), ElementReference.PackageOf(theirs)))
            .Select(theirs => new ElementNeighbour(own, theirs, other.Name))))];

    /// <summary>Elements of the row's packages that no channel names: nothing on the sheets says that they are on.</summary>
    internal static IEnumerable<Assumption> Idle(string reference, Transistor part, IReadOnlyList<ChannelRow> all)
    {
        string package = ElementReference.PackageOf(reference);
        HashSet<string> named = new(all.SelectMany(Elements), StringComparer.OrdinalIgnoreCase);
        return Enumerable.Range(1, part.Elements)
            .Select(n => package + "." + n.ToString(CultureInfo.InvariantCulture))
            .Where(element => !named.Contains(element))
            .Select(element => new Assumption("Element that no channel names", element, "off"));
    }

    private static IEnumerable<string> Elements(ChannelRow row) =>
        Transistors.SelectMany(row.Of).Where(r => ElementReference.ElementOf(r) is not null);

    private static bool Same(string a, string b) => string.Equals(a, b, StringComparison.OrdinalIgnoreCase);
}
