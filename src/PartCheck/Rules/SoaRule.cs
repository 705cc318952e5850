using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Rules;

/// <summary>
/// The pair (VCE, IC) inside the DC boundary of the safe operating area, state on, where the table gives one. Allowed current [A]:
/// log-log between the points, the IC rating below the first, nothing above the last; times (Tmax - T)/(Tmax - 25 degC), at most 1,
/// times factor. T is the ambient, or the case at Tj - d P RthJC, never cooler than the ambient (just switched on Tj is the ambient); d is
/// the duty where the junction's pulses were solved, else 1, so that the case is not taken for cooler than it is. The pair itself is that while
/// on. What the case reaches is not known without RthJA.
/// </summary>
public sealed class SoaRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "soa";

    /// <inheritdoc/>
    public override string Title => "Collector current at the collector-emitter voltage inside the derated safe operating area";

    /// <inheritdoc/>
    public override string Unit => "A";

    /// <inheritdoc/>
    public override bool AlwaysAsked => false;

    /// <inheritdoc/>
    public override string Source => "DC boundary of the part's sheet, reduced linearly to zero at Tj max (common practice, no source)";

    /// <inheritdoc/>
    public override bool Asked(Transistor part, BoundChannel channel, in RuleRows rows) => part is { Soa: not null };

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        Transistor part = point.Part;
        if (part is not { Soa: { } boundary, TjMax: { } max })
        {
            return Stress.NotVerified("Tj max of " + part.PartNumber);
        }

        if (part.Ic is not { } rating)
        {
            return Stress.NotVerified("IC of " + part.PartNumber);
        }

        double temperature = state.Corner.Ambient;
        if (part.SoaAtCase)
        {
            if (part.RthJc is not { } rth)
            {
                return Stress.NotVerified("RthJC of " + part.PartNumber);
            }

            temperature = Math.Max(temperature, point.Tj - (point.CaseShare * point.Power * rth.Value.KelvinsPerWatt));
        }

        double share = (max.Value.Kelvins - temperature) / (max.Value.Kelvins - PhysicalConstants.RoomTemperature);
        double allowed = Boundary(boundary.Value, rating.Value.Amperes, point.Vce) * Math.Clamp(share, 0, 1) * rows.Own.Factor;
        Stress stress = Stress.AtMostOf(point.Ic, allowed);
        return part.SoaAtCase && stress.Verdict == Verdict.Conforms && MissingData.Heat(state) is { } missing
            ? Stress.NotVerified(missing)
            : stress;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        Transistor part = point.Part;
        IReadOnlyList<SoaPoint> points = part.Soa!.Value;
        string cell = part.Soa.Cell;
        int right = 0;
        while (right < points.Count && point.Vce > points[right].Vce.Volts)
        {
            right++;
        }

        if (right == points.Count)
        {
            steps.Step("Isoa", "0 A", "A", "nothing: VCE is above the boundary's last point");
        }
        else if (points.Count == 1)
        {
            steps.Given("Isoa", points[0].Ic.Amperes, "A", "the boundary's only point", cell);
        }
        else if (right == 0 && point.Vce < points[0].Vce.Volts)
        {
            steps.Given("ICmax", part.Ic!.Value.Amperes, "A", "IC rating: VCE is below the boundary's first point", part.Ic.Cell).Step("Isoa", "ICmax", "A", "boundary at VCE");
        }
        else
        {
            SoaPoint b = points[Math.Max(right, 1)];
            SoaPoint a = points[Math.Max(right, 1) - 1];
            steps.Given("V1", a.Vce.Volts, "V", "boundary, point to the left", cell).Given("I1", a.Ic.Amperes, "A", "its current", cell)
                .Given("V2", b.Vce.Volts, "V", "boundary, point to the right", cell).Given("I2", b.Ic.Amperes, "A", "its current", cell)
                .Step("Isoa", "I1 x (I2 / I1) ^ (ln(VCE# / V1) / ln(V2 / V1))", "A", "boundary at VCE, log-log between the points");
        }

        string at = "Ta";
        if (part.SoaAtCase)
        {
            at = "Tcase";
            steps.Given("RthJC", part.RthJc!.Value.KelvinsPerWatt, "K/W", "junction to case", part.RthJc.Cell)
                .Step("Tcase", point.CaseShare == 1 ? "max(Ta, Tj# - P# x RthJC)" : "max(Ta, Tj# - d x P# x RthJC)", "degC", "case temperature");
        }

        steps.Given("Tmax#", part.TjMax!.Value.Celsius, "degC", "Tj max of " + part.PartNumber, part.TjMax.Cell)
            .Step("share", $"max(0, min(1, (Tmax# - {at}) / (Tmax# - 25 degC)))", string.Empty, "reduction, linear to zero at Tj max")
            .Factor(rows.Own)
            .Step("Iallowed", "Isoa x share x F", "A", "derated boundary")
            .AtMost("IC#", "Iallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.Soa?.Cell;

    /// <summary>The boundary's current at a voltage [A].</summary>
    private static double Boundary(IReadOnlyList<SoaPoint> points, double rating, double vce)
    {
        if (points.Count == 0 || vce > points[^1].Vce.Volts)
        {
            return 0;
        }

        if (vce < points[0].Vce.Volts)
        {
            return rating;
        }

        for (int i = 1; i < points.Count; i++)
        {
            SoaPoint right = points[i];
            if (vce <= right.Vce.Volts)
            {
                SoaPoint left = points[i - 1];
                double share = Math.Log(vce / left.Vce.Volts) / Math.Log(right.Vce.Volts / left.Vce.Volts);
                return left.Ic.Amperes * Math.Pow(right.Ic.Amperes / left.Ic.Amperes, share);
            }
        }

        return points[0].Ic.Amperes;
    }
}
