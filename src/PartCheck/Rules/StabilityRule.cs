using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.Rules;

/// <summary>
/// Thermal stability of legs that share one control, state on: the loop gain of the difference between two legs,
/// S = d VCE RthJA abs(dVBE/dT) / (Rs Ra/(Rs + Ra) + RE + VT/IC + RB/hFE), at most factor [-]. The ballast is Rs parallel Ra; Rs
/// alone of a leg that is not sensed and of the only one that is (the control holds that one's current: Ra is no ballast there, and S an
/// upper bound). dVBE/dT is the solved model's at constant IC; d is the duty where power is averaged (from 1 kHz up), else 1.
/// </summary>
public sealed class StabilityRule : TransistorRule
{
    /// <inheritdoc/>
    public override string Id => "stability";

    /// <inheritdoc/>
    public override string Title => "Thermal loop gain between legs below the derated edge of stability";

    /// <inheritdoc/>
    public override string Unit => string.Empty;

    /// <inheritdoc/>
    public override bool AlwaysAsked => false;

    /// <inheritdoc/>
    public override string Source => "S < 1 at fixed base voltage: own derivation, ballast held to ngspice (emitter ballasting, IEEE Trans. ED, 1970s)";

    /// <inheritdoc/>
    public override bool Asked(Transistor part, BoundChannel channel, in RuleRows rows) => channel is { Legs.Count: > 1 };

    /// <inheritdoc/>
    public override bool AppliesTo(Role role) => role == Role.Pass;

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (double.IsNaN(point.RthJa))
        {
            return Stress.NotVerified("RthJA of " + point.Part.PartNumber);
        }

        if (point.Ic <= 0)
        {
            return Stress.AtMostOf(0, rows.Own.Factor);
        }

        double thermal = point.AveragedShare * point.Vce * point.RthJa * Math.Abs(point.VbeSlope);
        double electrical = point.Ballast + point.EmitterResistance + (PhysicalConstants.ThermalVoltage(point.Tj) / point.Ic)
            + (point.BaseResistance * Math.Max(point.Ib, 0) / point.Ic);
        Stress stress = Stress.AtMostOf(thermal / electrical, rows.Own.Factor);

        // Without thermal data of any transistor the cold start alone was solved: it can refuse, but not clear.
        return stress.Verdict == Verdict.Conforms && MissingData.Heat(state) is { } missing ? Stress.NotVerified(missing) : stress;
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        if (point.Ic <= 0)
        {
            steps.Step("S", "0", string.Empty, "no current, no loop gain");
        }
        else
        {
            steps.Solved("slope#", Math.Abs(point.VbeSlope), "V/K", "abs(dVBE/dT) of the model at constant collector current")
                .Step("thermal", point.AveragedShare == 1 ? "VCE# x RthJA# x slope#" : "d x VCE# x RthJA# x slope#", "ohm", "volts of VBE that an ampere's heat shifts")
                .Step("electrical", "Rball# + RE# + VT# / IC# + Rbb# x max(0, IB#) / IC#", "ohm", "volts that an ampere drops: ballast, emitter, VT/IC, base")
                .Step("S", "thermal / electrical", string.Empty, "thermal loop gain between legs");
        }

        steps.Factor(rows.Own).Step("Sallowed", "1 x F", string.Empty, "derated edge of stability").AtMost("S", "Sallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(Transistor part) => part.RthJa?.Cell;
}
