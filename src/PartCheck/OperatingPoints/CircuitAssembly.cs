using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>Puts a channel's model into a corner: the circuit as numbers.</summary>
internal static class CircuitAssembly
{
    /// <summary>The circuit of a corner; leg groups in the order of the classes, the odd leg before the rest of its class.</summary>
    public static SinkCircuit Build(ChannelModel model, Corner corner, ChannelState state, int oddClass, int drop)
    {
        double h = corner.Heat;
        double ambient = corner.Ambient;
        List<LegGroup> groups = new(model.Classes.Count + 1);
        for (int c = 0; c < model.Classes.Count; c++)
        {
            int count = model.Classes[c].Legs.Count;
            if (c == oddClass)
            {
                BipolarDevice odd = corner.OddPass.Vbe == Extreme.Match
                    ? model.Pass[c].Matched(corner.Pass.Vbe, corner.OddPass.Hfe)
                    : model.Pass[c].At(corner.OddPass);
                groups.Add(Group(model, c, 1, odd, corner.OddSense, corner.OddAveraging, h, ambient));
                count--;
            }

            if (count > 0)
            {
                groups.Add(Group(model, c, count, model.Pass[c].At(corner.Pass), corner.Sense, corner.Averaging, h, ambient));
            }
        }

        return new SinkCircuit
        {
            PinVoltage = corner.PinLevel,
            PinResistance = corner.PinResistance,
            Feed = model.Feed.At(corner.Feed, ambient),
            PullDown = model.PullDown?.At(corner.PullDown, ambient) ?? double.PositiveInfinity,
            PullDownAt = model.Channel.PullDownAt,
            Supply = corner.Supply,
            Load = state == ChannelState.Unfed ? null : model.Load[drop],
            Control = model.Control.At(corner.Control),
            ControlHeat = Heat(model.Control.Part, model.ControlHeat, h, ambient),
            Legs = groups,
            HottestLegCoupling = h * (corner.AssumedCoupling ?? 0),
            BaseLeakage = state == ChannelState.Off
                ? model.Channel.Legs.Sum(l => l.PassPart.IcboMax?.Value.Amperes ?? 0)
                : 0,
        };
    }

    /// <summary>The nominal circuit: one group a leg, everything typical.</summary>
    public static SinkCircuit BuildNominal(ChannelModel model, PinSource pin, double ambient)
    {
        double h = model.Heats ? 1 : 0;
        List<LegGroup> groups = [];
        foreach (Leg leg in model.Channel.Legs)
        {
            int c = ClassOf(model, leg);
            groups.Add(new LegGroup(
                1, model.Pass[c].Nominal, model.Sense[c].Nominal, model.Averaging[c]?.Nominal ?? 0, leg.Sensed,
                Heat(model.Pass[c].Part, model.PassHeat[c], h, ambient), h * Coupling(model, c)));
        }

        ChannelConditions conditions = model.Channel.Conditions;
        return new SinkCircuit
        {
            PinVoltage = pin.NominalVoltage,
            PinResistance = pin.NominalResistance,
            Feed = model.Feed.Nominal,
            PullDown = model.PullDown?.Nominal ?? double.PositiveInfinity,
            PullDownAt = model.Channel.PullDownAt,
            Supply = (conditions.Supply.Min.Volts + conditions.Supply.Max.Volts) / 2,
            Load = model.NominalLoad,
            Control = model.Control.Nominal,
            ControlHeat = Heat(model.Control.Part, model.ControlHeat, h, ambient),
            Legs = groups,
            HottestLegCoupling = model.CouplingGiven ? 0 : h * ChannelModel.AssumedCouplingShare / 2,
        };
    }

    /// <summary>Index of a leg's class.</summary>
    public static int ClassOf(ChannelModel model, Leg leg)
    {
        for (int c = 0; c < model.Classes.Count; c++)
        {
            if (model.Classes[c].Legs.Contains(leg))
            {
                return c;
            }
        }

        throw new ArgumentException("The leg is not one of this channel's.", nameof(leg));
    }

    private static LegGroup Group(
        ChannelModel model, int c, int count, BipolarDevice pass, Extreme sense, Extreme averaging, double h, double ambient)
    {
        Leg leg = model.Classes[c].First;
        return new LegGroup(
            count, pass, model.Sense[c].At(sense, ambient), model.Averaging[c]?.At(averaging, ambient) ?? 0,
            leg.Sensed, Heat(leg.PassPart, model.PassHeat[c], h, ambient), model.CouplingGiven ? h * Coupling(model, c) : 0);
    }

    private static JunctionHeat Heat(Transistor part, PulsedHeat heat, double h, double ambient) =>
        new(ambient, h * (heat.Effective ?? 0), ChannelModel.RunawayLimit(part));

    /// <summary>Heating of the control by a leg's power while on, the duty counted as in the leg's own heating [K/W]; 0: not given.</summary>
    private static double Coupling(ChannelModel model, int c) =>
        model.PassHeat[c].Share * (model.Pass[c].Part.Coupling?.Value.KelvinsPerWatt ?? 0);
}
