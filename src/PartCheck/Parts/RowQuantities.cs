using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>Cells as quantities.</summary>
internal static class RowQuantities
{
    /// <summary>A column's value as a quantity; null when blank or unreadable.</summary>
    public static Cited<T>? Quantity<T>(this TableRow row, string column, Func<double, T> make) =>
        row.Number(column) is { } number ? new Cited<T>(make(number.Value), number.Cell) : null;

    /// <summary>A column's value as a bare quantity; null when blank or unreadable.</summary>
    public static T? Value<T>(this TableRow row, string column, Func<double, T> make)
        where T : struct => row.Number(column) is { } number ? make(number.Value) : null;
}
