using System.Globalization;
using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>One bound channel ready to be put into any corner: devices, resistor ranges, thermal data, what was assumed.</summary>
public sealed class ChannelModel
{
    /// <summary>Share of the hottest leg's RthJA that is assumed to heat the control where no coupling is given (or none).</summary>
    public const double AssumedCouplingShare = 0.2;

    private readonly List<Assumption> assumed = [];
    private readonly IReadOnlyList<LegCell>[] cells;

    /// <summary>Builds the model.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="variants">Devices of a transistor's row (shared between channels).</param>
    /// <param name="neighbourPowers">
    /// Highest dissipation of elements in other channels that share a package with this one's, by reference [W]; null: they are off.
    /// </param>
    public ChannelModel(
        BoundChannel channel, Func<Transistor, TransistorVariants> variants, IReadOnlyDictionary<string, double>? neighbourPowers = null)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(variants);
        Channel = channel;
        Package = new PackageHeat(channel, neighbourPowers);
        Classes = LegClass.Of(channel, Package);
        cells = [.. Enumerable.Range(-1, Classes.Count + 1).Select(odd => LegPartition.Of(channel, Classes, Package, odd))];
        Slots = new Slots(channel, Classes);
        Pass = [.. Classes.Select(c => variants(c.First.PassPart))];
        Sense = [.. Classes.Select(c => new ResistorRange(c.First.SensePart))];
        Averaging = [.. Classes.Select(c => c.First.AveragingPart is { } part ? new ResistorRange(part) : null)];
        Control = variants(channel.ControlPart);
        Feed = new ResistorRange((ResistorPart)channel.Feed.Part);
        PullDown = channel.PullDown is null ? null : new ResistorRange((ResistorPart)channel.PullDown.Part);
        PassRth = [.. Pass.Select(p => Rth(p.Part))];
        ControlRth = Rth(Control.Part);
        PassHeat = [.. Pass.Select((p, i) => PulsedHeat.Of(p.Part, PassRth[i], channel.Conditions))];
        ControlHeat = PulsedHeat.Of(Control.Part, ControlRth, channel.Conditions);
        Heats = ControlRth is not null && PassRth.All(r => r is not null);
        CouplingGiven = Enumerable.Range(0, channel.Legs.Count).All(i => channel.Legs[i].PassPart.Coupling is not null || Package.WithControl(i));
        OneLegSensed = channel.Legs.Count(l => l.Sensed) == 1;
        Load = [LoadAt(channel.Conditions.LoadDrop.Min.Volts), LoadAt(channel.Conditions.LoadDrop.Max.Volts)];
        NominalLoad = LoadAt((channel.Conditions.LoadDrop.Min.Volts + channel.Conditions.LoadDrop.Max.Volts) / 2);
        CollectAssumptions();
    }

    /// <summary>The channel.</summary>
    public BoundChannel Channel { get; }

    /// <summary>Who shares a package with whom.</summary>
    public PackageHeat Package { get; }

    /// <summary>Its legs, grouped.</summary>
    public IReadOnlyList<LegClass> Classes { get; }

    /// <summary>What solved points stand for.</summary>
    public Slots Slots { get; }

    /// <summary>Pass devices, by leg class.</summary>
    public IReadOnlyList<TransistorVariants> Pass { get; }

    /// <summary>Sense resistors, by leg class.</summary>
    public IReadOnlyList<ResistorRange> Sense { get; }

    /// <summary>Averaging resistors, by leg class; null: none.</summary>
    public IReadOnlyList<ResistorRange?> Averaging { get; }

    /// <summary>Control device.</summary>
    public TransistorVariants Control { get; }

    /// <summary>Feed resistor.</summary>
    public ResistorRange Feed { get; }

    /// <summary>Pull-down resistor; null: none.</summary>
    public ResistorRange? PullDown { get; }

    /// <summary>Thermal resistance of the pass transistors at steady power [K/W], by leg class; null: not to be had.</summary>
    public IReadOnlyList<double?> PassRth { get; }

    /// <summary>Thermal resistance of the control at steady power [K/W]; null: not to be had.</summary>
    public double? ControlRth { get; }

    /// <summary>How the pass transistors heat themselves at the channel's duty, by leg class.</summary>
    public IReadOnlyList<PulsedHeat> PassHeat { get; }

    /// <summary>How the control heats itself at the channel's duty.</summary>
    public PulsedHeat ControlHeat { get; }

    /// <summary>True where every transistor's thermal resistance is known, so that h = 1 can be solved.</summary>
    public bool Heats { get; }

    /// <summary>True where the table gives the coupling of every pass transistor that is not in one package with the control.</summary>
    public bool CouplingGiven { get; }

    /// <summary>
    /// True where the control senses one leg alone. It holds that leg's current, so nothing is averaged: an averaging resistor there carries
    /// the control's base current and is no ballast.
    /// </summary>
    public bool OneLegSensed { get; }

    /// <summary>Load at the smallest and the largest drop.</summary>
    public IReadOnlyList<LoadElement> Load { get; }

    /// <summary>Load at the centre of the drop.</summary>
    public LoadElement NominalLoad { get; }

    /// <summary>What was assumed.</summary>
    public IReadOnlyList<Assumption> Assumed => assumed;

    /// <summary>Cells of legs that are alike where one class gives the odd leg; -1: none is odd.</summary>
    public IReadOnlyList<LegCell> Cells(int oddClass) => cells[oddClass + 1];

    /// <summary>Junction temperature at which a runaway is held: Tj max + 50 K, or 200 degC where it is missing [K].</summary>
    public static double RunawayLimit(Transistor part) => (part.TjMax?.Value.Kelvins + 50) ?? 473.15;

    private static double? Rth(Transistor part) =>
        part.RthJa?.Value.KelvinsPerWatt
        ?? (part.TjMax is { } t && part.Power is { } p && p.Value.Watts > 0
            ? (t.Value.Kelvins - part.FlatTo.Kelvins) / p.Value.Watts
            : null);

    /// <summary>The load at a drop [V].</summary>
    internal LoadElement LoadAt(double drop)
    {
        ChannelConditions c = Channel.Conditions;
        return LoadElement.FromDrop(drop, c.CurrentNominal.Amperes, c.LoadSlope.Ohms, c.Leds);
    }

    private void CollectAssumptions()
    {
        IEnumerable<TransistorVariants> transistors = Pass.Append(Control).Distinct();
        foreach (TransistorVariants t in transistors)
        {
            assumed.AddRange(t.Assumed);
            if (t.Part.RthJa is null && Rth(t.Part) is { } rth)
            {
                assumed.Add(new Assumption("RthJA", t.Part.PartNumber, string.Create(CultureInfo.InvariantCulture, $"{rth:0.#} K/W, from Tj max and Power")));
            }
        }

        if (Channel.Legs.Count > 1)
        {
            assumed.AddRange(Pass.Where(p => p.Part.VbeMatch is null && p.VbeVaries).Distinct()
                .Select(p => new Assumption("VBE match between legs", p.Part.PartNumber, "the whole window")));
        }

        if (!CouplingGiven && Heats)
        {
            assumed.Add(new Assumption("Coupling", Channel.Name, "both 0 and 0.2 RthJA of the hottest leg"));
        }

        foreach (Transistor part in Package.Sharing)
        {
            if (part.RthJaBoth is null && Rth(part) is not null)
            {
                assumed.Add(new Assumption("RthJA both", part.PartNumber, "heat between the elements both none and all of it"));
            }

            if (part.PowerBoth is null && part.Power is not null)
            {
                assumed.Add(new Assumption("Power both", part.PartNumber, "that of one element for all together"));
            }
        }

        foreach (ResistorRange r in Sense.Concat(Averaging.OfType<ResistorRange>()).Append(Feed).Concat(PullDown is null ? [] : [PullDown]).Where(r => r.Part.Tcr is null && r.Nominal > 0))
        {
            assumed.Add(new Assumption("TCR", r.Part.PartNumber, "200 ppm/K"));
        }

        assumed.AddRange(Pass.Append(Control).Zip(PassHeat.Append(ControlHeat), (t, heat) => PulsedHeat.AssumptionOf(heat, t.Part, Channel))
            .OfType<Assumption>().Distinct());
    }
}
