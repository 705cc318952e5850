using System.Reflection;
using PartCheck.Devices;

namespace PartCheck.Parts;

/// <summary>Compares two rows of one key, column by column, cells left aside.</summary>
internal static class PartAgreement
{
    /// <summary>The first property in which they differ; null where they agree.</summary>
    public static string? FirstDifference(Part a, Part b)
    {
        if (a.GetType() != b.GetType())
        {
            return "Kind";
        }

        foreach (PropertyInfo property in a.GetType().GetProperties().OrderBy(p => p.Name, StringComparer.Ordinal))
        {
            if (property.Name is nameof(Part.Cell) or nameof(Part.PartNumber) or nameof(Part.Manufacturer) or nameof(Part.Mounting) or "EqualityContract")
            {
                continue;
            }

            if (!Same(property.GetValue(a), property.GetValue(b)))
            {
                return ColumnOf(property.Name);
            }
        }

        return null;
    }

    private static bool Same(object? a, object? b)
    {
        a = Bare(a);
        b = Bare(b);
        if (a is ModelCard one && b is ModelCard other)
        {
            return one.Name == other.Name && one.Parameters == other.Parameters;
        }

        return a is System.Collections.IEnumerable x and not string && b is System.Collections.IEnumerable y
            ? x.Cast<object>().SequenceEqual(y.Cast<object>())
            : Equals(a, b);
    }

    /// <summary>The column that a property is read from, as the part table writes it.</summary>
    private static string ColumnOf(string property) => property switch
    {
        nameof(Transistor.Hfe) => "hFE points",
        nameof(Transistor.HfeCold) => "hFE cold min",
        nameof(Transistor.Vbe) => "VBE min",
        nameof(Transistor.Zth) => "Zth points",
        nameof(Transistor.SoaAtCase) => "SOA at",
        nameof(Transistor.Card) => "Model",
        nameof(LedPart.ForwardCurrentMax) => "IF",
        nameof(LedPart.ForwardCurrentFlatTo) => "IF flat to",
        nameof(LedPart.ForwardCurrentSlope) => "IF slope",
        nameof(RefusedPart.Reason) => "Kind",
        _ => PartColumns.All.FirstOrDefault(c => string.Equals(Joined(c.Name), property, StringComparison.OrdinalIgnoreCase))?.Name ?? property,
    };

    private static string Joined(string column) => column.Replace(" ", string.Empty, StringComparison.Ordinal);

    /// <summary>The value inside a citation.</summary>
    private static object? Bare(object? value) =>
        value?.GetType() is { IsGenericType: true } type && type.GetGenericTypeDefinition() == typeof(Quantities.Cited<>)
            ? type.GetProperty("Value")!.GetValue(value)
            : value;
}
