using System.Reflection;

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
            if (property.Name is nameof(Part.Cell) or nameof(Part.PartNumber) or nameof(Part.Manufacturer) or "EqualityContract")
            {
                continue;
            }

            if (!Same(property.GetValue(a), property.GetValue(b)))
            {
                return property.Name;
            }
        }

        return null;
    }

    private static bool Same(object? a, object? b)
    {
        a = Bare(a);
        b = Bare(b);
        return a is System.Collections.IEnumerable x and not string && b is System.Collections.IEnumerable y
            ? x.Cast<object>().SequenceEqual(y.Cast<object>())
            : Equals(a, b);
    }

    /// <summary>The value inside a citation.</summary>
    private static object? Bare(object? value) =>
        value?.GetType() is { IsGenericType: true } type && type.GetGenericTypeDefinition() == typeof(Quantities.Cited<>)
            ? type.GetProperty("Value")!.GetValue(value)
            : value;
}
