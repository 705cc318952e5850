using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>
/// Voltage across a resistor, states on and unfed. Allowed: the lower of limiting element voltage x factor and
/// sqrt(allowed power x R) [V]. Without a limiting element voltage the second alone (noted in the findings).
/// </summary>
public sealed class ResistorVoltageRule : ResistorRule
{
    /// <inheritdoc/>
    public override string Id => "r-voltage";

    /// <inheritdoc/>
    public override string Title => "Resistor voltage at most the derated limiting element voltage and sqrt(P R)";

    /// <inheritdoc/>
    public override string Unit => "V";

    /// <inheritdoc/>
    public override string Source => "lesser of derated maximum voltage and sqrt(Pd R) (NASA EEE-INST-002, R2 Table 4, note 2)";

    /// <inheritdoc/>
    public override Stress Evaluate(SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows)
    {
        if (point.Resistance == 0)
        {
            return Stress.AtMostOf(0, 0);
        }

        double power = ResistorPowerRule.Allowed(point.Part, rows.ResistorPower, state.Corner.Ambient);
        double element = point.Part.WorkingVoltageMax is { } max ? max.Value.Volts * rows.Own.Factor : double.PositiveInfinity;
        if (double.IsNaN(power))
        {
            // The element voltage alone can refuse, but not clear.
            Stress alone = Stress.AtMostOf(point.Voltage, element);
            return alone.Verdict == Verdict.Nonconforming
                ? alone
                : Stress.NotVerified((point.Part.Power is null ? "Power of " : "Film max of ") + point.Part.PartNumber);
        }

        return Stress.AtMostOf(point.Voltage, Math.Min(element, Math.Sqrt(power * point.Resistance)));
    }

    /// <inheritdoc/>
    public override void Derive(Derivation steps, SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress)
    {
        if (point.Resistance == 0)
        {
            steps.Note("A zero-ohm resistor has no voltage across it.");
            return;
        }

        string limit = string.Empty;
        if (point.Part.WorkingVoltageMax is { } max)
        {
            steps.Given("Vmax", max.Value.Volts, "V", "limiting element voltage of " + point.Part.PartNumber, max.Cell).Factor(rows.Own);
            limit = "Vmax x F";
        }
        else
        {
            steps.Note("No limiting element voltage is given: sqrt(P R) alone.");
        }

        if (!double.IsNaN(ResistorPowerRule.Allowed(point.Part, rows.ResistorPower, state.Corner.Ambient)))
        {
            ResistorPowerRule.DeriveAllowed(steps, point.Part, rows.ResistorPower, state.Corner.Ambient);
            limit = limit.Length == 0 ? "sqrt(Pallowed x @)" : $"min({limit}, sqrt(Pallowed x @))";
        }

        steps.Step("Vallowed", limit, "V", "the lower of both limits").AtMost("VR", "Vallowed", stress);
    }

    /// <inheritdoc/>
    public override string? DecidingCell(ResistorPart part) => part.WorkingVoltageMax?.Cell ?? part.Power?.Cell;

    /// <inheritdoc/>
    public override string? Remark(Placement placement, BoundChannel channel, in Stress stress) =>
        placement.Part is ResistorPart { WorkingVoltageMax: null, Resistance.Value.Ohms: > 0 } ? "no limiting element voltage given: judged by sqrt(P R) alone" : null;
}
