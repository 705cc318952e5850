using FluentValidation;
using PartCheck.Sheets;

namespace PartCheck.Parts;

/// <summary>What must hold between the columns of a transistor's row.</summary>
internal sealed class TransistorValidator : AbstractValidator<Transistor>
{
    public TransistorValidator()
    {
        this.Demand("Power", PartValidation.PowerFitsAmbient, "the power in ambient air", _ => PartValidation.CasePower);
        this.Demand("Tj max", p => p.TjMax is null || p.TjMax.Value.Kelvins > p.FlatTo.Kelvins, "a temperature above Power flat to", _ => "Tj max is not above the temperature up to which the power holds.");
        this.Demand("VBE min", p => p.Vbe is not { Value: { Min: { } min, Max: { } max } } || min.Volts <= max.Volts, "a voltage at most VBE max", _ => "VBE min is above VBE max.");
        this.Demand("VBE typ", p => p.Vbe is not { Value: { Typ: { } typ } w } || ((w.Min is not { } min || min.Volts <= typ.Volts) && (w.Max is not { } max || typ.Volts <= max.Volts)), "a voltage inside the window", _ => "VBE typ lies outside VBE min to VBE max.");
        this.Demand("VCBO", p => p.Vcbo is null || p.Vceo is null || p.Vcbo.Value.Volts >= p.Vceo.Value.Volts, "a voltage at least VCEO", _ => "VCBO is below VCEO: with the emitter open a junction stands at least as much.");
        this.Demand("RthJC", p => p.RthJc is null || p.RthJa is null || p.RthJc.Value.KelvinsPerWatt <= p.RthJa.Value.KelvinsPerWatt, "a thermal resistance at most RthJA", _ => "RthJC is above RthJA: the way to the air leads through the case.");
        this.Demand("RthJA both", p => p.RthJaBoth is null || p.Elements > 1, "a blank cell, or Elements above 1", _ => "RthJA both is of a package of several transistors, and Elements says one.");
        this.Demand("Power both", p => p.PowerBoth is null || p.Elements > 1, "a blank cell, or Elements above 1", _ => "Power both is of a package of several transistors, and Elements says one.");
        this.Demand("RthJA both", p => p.Elements < 2 || p.RthJaBoth is not { } both || p.RthJa is not { } one || (both.Value.KelvinsPerWatt <= one.Value.KelvinsPerWatt && both.Value.KelvinsPerWatt * p.Elements >= one.Value.KelvinsPerWatt), "the temperature rise over the power of all elements together", _ => "RthJA both lies between RthJA and RthJA over the number of elements: it is the rise over the sum of the powers.");
        this.Demand("Power both", p => p.Elements < 2 || p.PowerBoth is not { } both || p.Power is not { } one || (both.Value.Watts >= one.Value.Watts && both.Value.Watts <= p.Elements * one.Value.Watts), "the power of all elements together", _ => "Power both lies between Power, which is of one element, and that times the number of elements.");
        this.Demand("hFE cold min", p => p.HfeCold is null || p.Hfe is not null, "hFE points at 25 degC", _ => "A gain in the cold needs the gain at 25 degC beside it.");
    }
}

/// <summary>What must hold between the columns of a resistor's row.</summary>
internal sealed class ResistorValidator : AbstractValidator<ResistorPart>
{
    public ResistorValidator()
    {
        this.Demand("Power", PartValidation.PowerFitsAmbient, "the power in ambient air", _ => PartValidation.CasePower);
        this.Demand("Tj max", p => p.TjMax is null || p.TjMax.Value.Kelvins > p.FlatTo.Kelvins, "a temperature above Power flat to", _ => "The film maximum is not above the temperature up to which the power holds.");
    }
}

/// <summary>What must hold between the columns of an LED's row.</summary>
internal sealed class LedValidator : AbstractValidator<LedPart>
{
    public LedValidator()
    {
        this.Demand("Tj max", p => p.TjMax is null || p.TjMax.Value.Kelvins > p.FlatTo.Kelvins, "a temperature above IF flat to", _ => "Tj max is not above the temperature up to which the forward current holds.");
        this.Demand("IF slope", p => p.ForwardCurrentSlope is null || p.ForwardCurrentMax is not null, "the forward current beside it", _ => "A slope of the forward current needs IF beside it.");
    }
}

/// <summary>What both kinds share.</summary>
internal static class PartValidation
{
    public const string CasePower =
        "This power is more than RthJA allows in ambient air (1.3 times (Tj max - flat)/RthJA): it is a power at case temperature; give the one in ambient air.";

    public static bool PowerFitsAmbient(Part p) =>
        p is not { Power: { } power, TjMax: { } max, RthJa: { } rth }
        || power.Value.Watts <= 1.3 * (max.Value.Kelvins - p.FlatTo.Kelvins) / rth.Value.KelvinsPerWatt;
}
