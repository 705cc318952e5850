using PartCheck.Quantities;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>The current gain: a cell of points, or hFE min and max at one current.</summary>
internal static class GainPoints
{
    /// <summary><c>0.1mA:50..; 1mA:75..325; 10mA:100..</c>, rising in current.</summary>
    public static Cited<IReadOnlyList<HfePoint>>? Read(TableRow row)
    {
        const string Wanted = "points such as 1mA:75..325; 10mA:100..";
        List<HfePoint> points = [];
        if (row.Text("hFE points") is { } text)
        {
            foreach ((string at, string range) in PointText.Pairs(row, "hFE points", text, Wanted))
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
                else if (current is > 0 and <= 20)
                {
                    points.Add(new HfePoint(Current.FromAmperes(current.Value), min, max));
                }
                else if (current is not null)
                {
                    row.Complain("hFE points", Wanted, $"A collector current of {at} is not plausible: above 0, at most 20 A.");
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
