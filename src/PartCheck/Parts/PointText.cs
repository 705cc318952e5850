using System.Globalization;
using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>Cells that hold a list of points <c>at:value; at:value</c>: safe operating area, transient thermal resistance.</summary>
internal static class PointText
{
    private const double HighestVolts = 2000;
    private const double HighestAmperes = 20;
    private const double LongestSeconds = 1e4;
    private const double HighestKelvinsPerWatt = 5000;

    /// <summary><c>5V:200mA; 20V:80mA</c>, rising in voltage, the current never rising.</summary>
    public static Cited<IReadOnlyList<SoaPoint>>? Soa(TableRow row)
    {
        List<(double At, double Value)>? points = Points(
            row, "SOA", "points such as 5V:200mA; 20V:80mA", ColumnKind.Voltage, HighestVolts, ColumnKind.Current, HighestAmperes);
        if (points is null)
        {
            return null;
        }

        if (points.Zip(points.Skip(1)).Any(p => p.Second.Value > p.First.Value))
        {
            row.Complain("SOA", "a current that falls with the voltage", "The boundary's current rises with the voltage: a safe operating area only narrows.");
        }

        return new Cited<IReadOnlyList<SoaPoint>>(
            [.. points.Select(p => new SoaPoint(Voltage.FromVolts(p.At), Current.FromAmperes(p.Value)))], row.Cite("SOA"));
    }

    /// <summary><c>1ms:25; 10ms:60</c> K/W, rising in time, the thermal resistance never falling.</summary>
    public static IReadOnlyList<ZthPoint> Zth(TableRow row)
    {
        if (row.Text("Zth points") is { } text && text.Split(';').FirstOrDefault(p => p.Split(':') is [var at, _] && double.TryParse(at, CultureInfo.InvariantCulture, out _)) is { } bare)
        {
            // A sheet gives pulses in milliseconds as often as in seconds, and a thousand times too long is a junction too cool.
            row.Complain("Zth points", "points such as 1ms:25; 10ms:60", $"The time of the point \"{bare.Trim()}\" has no unit: ms, us or s.");
            return [];
        }

        List<(double At, double Value)> points = Points(
            row, "Zth points", "points such as 1ms:25; 10ms:60", ColumnKind.Time, LongestSeconds, ColumnKind.ThermalResistance, HighestKelvinsPerWatt) ?? [];
        if (points.Zip(points.Skip(1)).Any(p => p.Second.Value < p.First.Value))
        {
            row.Complain("Zth points", "a thermal resistance that rises with time", "The thermal resistance falls with time: a junction only warms up.");
        }

        if (points.Count > 0 && row.Number("RthJA") is { } rth && points[^1].Value > rth.Value)
        {
            row.Complain("Zth points", "at most RthJA", "A point lies above RthJA: a pulse does not heat more than steady power.");
        }

        return [.. points.Select(p => new ZthPoint(p.At, ThermalResistance.FromKelvinsPerWatt(p.Value)))];
    }

    /// <summary>The sides of each point; an item that is no point is a complaint.</summary>
    internal static IEnumerable<(string At, string Value)> Pairs(TableRow row, string column, string text, string wanted)
    {
        foreach (string item in text.Split(';', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries))
        {
            string[] sides = item.Split(':', StringSplitOptions.TrimEntries);
            if (sides.Length == 2 && sides[0].Length > 0 && sides[1].Length > 0)
            {
                yield return (sides[0], sides[1]);
            }
            else
            {
                row.Complain(column, wanted, $"\"{item}\" is no point: {wanted} are wanted.");
            }
        }
    }

    private static List<(double At, double Value)>? Points(
        TableRow row, string column, string wanted, ColumnKind atKind, double atMost, ColumnKind valueKind, double valueMost)
    {
        if (row.Text(column) is not { } text || text is "-")
        {
            return null;
        }

        List<(double At, double Value)> points = [];
        int items = 0;
        foreach ((string at, string value) in Pairs(row, column, text, wanted))
        {
            items++;
            double? x = row.Part(column, at, atKind);
            double? y = row.Part(column, value, valueKind);
            if (x is null || y is null)
            {
                continue;
            }

            if (x <= 0 || y <= 0 || x > atMost || y > valueMost)
            {
                row.Complain(column, wanted, $"The point {at}:{value} is not plausible: both sides are above zero and write their units.");
                continue;
            }

            points.Add((x.Value, y.Value));
        }

        if (items == 0 && !row.HasComplaints)
        {
            row.Complain(column, wanted, $"\"{text}\" holds no point.");
        }

        points.Sort((a, b) => a.At.CompareTo(b.At));
        if (points.Zip(points.Skip(1)).Any(p => p.First.At == p.Second.At))
        {
            row.Complain(column, "each point once", $"Two points of {column} stand at the same place.");
        }

        return points;
    }
}
