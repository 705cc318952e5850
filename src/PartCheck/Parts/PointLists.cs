using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>Cells that hold a list of points: gain, safe operating area, transient thermal resistance.</summary>
internal static class PointLists
{
    /// <summary><c>0.1mA:50..; 1mA:75..325; 10mA:100..</c>, rising in current.</summary>
    public static Cited<IReadOnlyList<HfePoint>>? Hfe(TableRow row)
    {
        const string Wanted = "points such as 1mA:75..325; 10mA:100..";
        List<HfePoint> points = [];
        if (row.Text("hFE points") is { } text)
        {
            foreach ((string at, string range) in Pairs(row, "hFE points", text, Wanted))
            {
                string[] ends = range.Split("..");
                if (ends.Length > 2)
                {
                    row.Complain("hFE points", Wanted, $"The gain \"{range}\" is no range such as 75..325 or 100.. .");
                    continue;
                }

                double? current = row.Part("hFE points", at, ColumnKind.Current);
                double? min = End(row, ends[0]);
                double? max = ends.Length == 1 ? null : End(row, ends[1]);
                if (min is null && max is null)
                {
                    row.Complain("hFE points", Wanted, $"The point at {at} has no gain.");
                }
                else if (current is > 0)
                {
                    points.Add(new HfePoint(Current.FromAmperes(current.Value), min, max));
                }
                else if (current is not null)
                {
                    row.Complain("hFE points", Wanted, $"The current {at} is not above zero.");
                }
            }

            points.Sort((a, b) => a.At.CompareTo(b.At));
            for (int i = 1; i < points.Count; i++)
            {
                if (points[i].At == points[i - 1].At)
                {
                    row.Complain("hFE points", "each current once", "Two points stand at the same current.");
                }
            }
        }

        Cited<double>? least = row.Number("hFE min");
        Cited<double>? most = row.Number("hFE max");
        if (least is not null || most is not null)
        {
            if (points.Count > 0)
            {
                row.Complain("hFE points", "either hFE points or hFE min, hFE max and hFE at", "The gain is given twice, as points and as hFE min or max: keep one.");
            }
            else if (row.Number("hFE at") is { } at)
            {
                points.Add(new HfePoint(Current.FromAmperes(at.Value), least?.Value, most?.Value));
            }
            else if (!row.HasComplaints)
            {
                row.Complain("hFE at", "the collector current of hFE min and max", "A gain without its collector current says nothing.");
            }
        }

        foreach (HfePoint p in points)
        {
            if (p.Min > p.Max)
            {
                row.Complain(row.Text("hFE points") is null ? "hFE min" : "hFE points", "a minimum at most the maximum", "The smallest gain is above the largest.");
            }
        }

        return points.Count == 0
            ? null
            : new Cited<IReadOnlyList<HfePoint>>(points, row.Cite(row.Text("hFE points") is not null ? "hFE points" : least is not null ? "hFE min" : "hFE max"));
    }

    /// <summary><c>5V:200mA; 20V:80mA</c>, rising in voltage.</summary>
    public static Cited<IReadOnlyList<SoaPoint>>? Soa(TableRow row)
    {
        if (row.Text("SOA") is not { } text)
        {
            return null;
        }

        List<SoaPoint> points = [];
        foreach ((string at, string value) in Pairs(row, "SOA", text, "points such as 5V:200mA; 20V:80mA"))
        {
            double? volts = row.Part("SOA", at, ColumnKind.Voltage);
            double? amperes = row.Part("SOA", value, ColumnKind.Current);
            if (volts is > 0 && amperes is > 0)
            {
                points.Add(new SoaPoint(Voltage.FromVolts(volts.Value), Current.FromAmperes(amperes.Value)));
            }
        }

        points.Sort((a, b) => a.Vce.CompareTo(b.Vce));
        return new Cited<IReadOnlyList<SoaPoint>>(points, row.Cite("SOA"));
    }

    /// <summary><c>1ms:25; 10ms:60</c> K/W, rising in time.</summary>
    public static IReadOnlyList<ZthPoint> Zth(TableRow row)
    {
        List<ZthPoint> points = [];
        if (row.Text("Zth points") is { } text)
        {
            foreach ((string at, string value) in Pairs(row, "Zth points", text, "points such as 1ms:25; 10ms:60"))
            {
                double? seconds = row.Part("Zth points", at, ColumnKind.Time);
                double? rth = row.Part("Zth points", value, ColumnKind.ThermalResistance);
                if (seconds is > 0 && rth is > 0)
                {
                    points.Add(new ZthPoint(seconds.Value, ThermalResistance.FromKelvinsPerWatt(rth.Value)));
                }
            }
        }

        points.Sort((a, b) => a.Seconds.CompareTo(b.Seconds));
        return points;
    }

    private static IEnumerable<(string At, string Value)> Pairs(TableRow row, string column, string text, string wanted)
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

    private static double? End(TableRow row, string text)
    {
        if (text.Trim().Length == 0)
        {
            return null;
        }

        double? value = row.Part("hFE points", text, ColumnKind.Number);
        if (value is < 1 or > 20000)
        {
            row.Complain("hFE points", "gains between 1 and 20000", $"A gain of {text.Trim()} is not plausible.");
            return null;
        }

        return value;
    }
}
