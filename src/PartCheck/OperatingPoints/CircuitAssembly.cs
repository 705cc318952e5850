using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>Puts a channel's model into a corner: the circuit as numbers.</summary>
internal static class CircuitAssembly
{
    /// <summary>The circuit of a corner; leg groups in the order of the model's cells, the odd leg before the rest of its class.</summary>
    public static SinkCircuit Build(ChannelModel model, Corner corner, ChannelState state, int oddClass, int drop)
    {
        double h = corner.Heat;
        double ambient = corner.Ambient;
        IReadOnlyList<LegCell> cells = model.Cells(oddClass);
        double share = corner.AssumedPackageCoupling ?? 0;
        bool neighbours = corner.NeighboursOn ?? false;
        List<LegGroup> groups = new(cells.Count);
        foreach (LegCell cell in cells)
        {
            int c = cell.Class;
            BipolarDevice pass = !cell.Odd ? model.Pass[c].At(corner.Pass)
                : corner.OddPass.Vbe == Extreme.Match ? model.Pass[c].Matched(corner.Pass.Vbe, corner.OddPass.Hfe)
                : model.Pass[c].At(corner.OddPass);
            JunctionHeat heat = Heat(model, cell.Legs[0] + 1, model.PassHeat[c], h, ambient, neighbours ? share : null);
            groups.Add(Group(model, cell, pass, cell.Odd ? corner.OddSense : corner.Sense, cell.Odd ? corner.OddAveraging : corner.Averaging, h, ambient, heat));
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
            ControlHeat = Heat(model, 0, model.ControlHeat, h, ambient, neighbours ? share : null),
            Legs = groups,
            HottestLegCoupling = h * (corner.AssumedCoupling ?? 0),
            Package = Couplings(model, cells, h, share),
            BaseLeakage = state == ChannelState.Off
                ? model.Channel.Legs.Sum(l => l.PassPart.IcboMax?.Value.Amperes ?? 0)
                : 0,
        };
    }

    /// <summary>The nominal circuit: one group a leg, everything typical, elements of other channels off.</summary>
    public static SinkCircuit BuildNominal(ChannelModel model, PinSource pin, double ambient)
    {
        double h = model.Heats ? 1 : 0;
        List<LegGroup> groups = [];
        List<LegCell> cells = [];
        foreach (Leg leg in model.Channel.Legs)
        {
            int c = ClassOf(model, leg);
            int index = groups.Count;
            cells.Add(new LegCell(c, false, [index]));
            groups.Add(new LegGroup(
                1, model.Pass[c].Nominal, model.Sense[c].Nominal, model.Averaging[c]?.Nominal ?? 0, leg.Sensed,
                Heat(model, index + 1, model.PassHeat[c], h, ambient, null),
                model.Package.WithControl(index) ? 0 : h * Coupling(model, c)));
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
            ControlHeat = Heat(model, 0, model.ControlHeat, h, ambient, null),
            Legs = groups,
            HottestLegCoupling = model.CouplingGiven ? 0 : h * ChannelModel.AssumedCouplingShare / 2,
            Package = Couplings(model, cells, h, 0.5),
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

    /// <summary>Who heats whom inside packages, cell by cell.</summary>
    private static List<PackageCoupling> Couplings(ChannelModel model, IReadOnlyList<LegCell> cells, double h, double share)
    {
        if (h == 0 || !model.Package.Shares)
        {
            return [];
        }

        List<PackageCoupling> couplings = [];
        for (int d = 0; d <= cells.Count; d++)
        {
            // Every leg of a cell has the same around it: the first stands for all.
            IReadOnlyList<int> partners = model.Package.Partners(d == 0 ? 0 : cells[d - 1].Legs[0] + 1);
            PulsedHeat heat = d == 0 ? model.ControlHeat : model.PassHeat[cells[d - 1].Class];
            Transistor part = d == 0 ? model.Control.Part : model.Pass[cells[d - 1].Class].Part;
            for (int by = 0; by <= cells.Count && partners.Count > 0; by++)
            {
                int beside = partners.Count(p => by == 0 ? p == 0 : p > 0 && cells[by - 1].Legs.Contains(p - 1));
                double coupling = h * beside * heat.Share * PackageHeat.Coupling(part, heat.Steady ?? 0, share);
                if (coupling > 0)
                {
                    couplings.Add(new PackageCoupling(d, by, coupling));
                }
            }
        }

        return couplings;
    }

    private static LegGroup Group(
        ChannelModel model, LegCell cell, BipolarDevice pass, Extreme sense, Extreme averaging, double h, double ambient, JunctionHeat heat)
    {
        int c = cell.Class;
        Leg leg = model.Classes[c].First;
        return new LegGroup(
            cell.Legs.Count, pass, model.Sense[c].At(sense, ambient), model.Averaging[c]?.At(averaging, ambient) ?? 0, leg.Sensed, heat,
            model.CouplingGiven && !model.Package.WithControl(cell.Legs[0]) ? h * Coupling(model, c) : 0);
    }

    /// <summary>Surroundings of a device (0 the control, from 1 the legs); a neighbour share: elements of other channels are on and warm it.</summary>
    private static JunctionHeat Heat(ChannelModel model, int device, PulsedHeat heat, double h, double ambient, double? neighbourShare)
    {
        Transistor part = device == 0 ? model.Control.Part : model.Channel.Legs[device - 1].PassPart;
        double warmed = neighbourShare is { } share && model.Package.NeighbourPower(device) is > 0 and double power
            ? PackageHeat.Coupling(part, heat.Steady ?? 0, share) * power : 0;
        return new(ambient + warmed, h * (heat.Effective ?? 0), ChannelModel.RunawayLimit(part));
    }

    /// <summary>Heating of the control by a leg's power while on, the duty counted as in the leg's own heating [K/W]; 0: not given.</summary>
    private static double Coupling(ChannelModel model, int c) =>
        model.PassHeat[c].Share * (model.Pass[c].Part.Coupling?.Value.KelvinsPerWatt ?? 0);
}
