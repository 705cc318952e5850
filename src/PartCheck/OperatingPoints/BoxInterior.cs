using PartCheck.Channels;
using PartCheck.Devices;

namespace PartCheck.OperatingPoints;

/// <summary>
/// Points of a box that are no corners: every dimension of <see cref="BoxDimension"/> anywhere in its range, heat and coupling those of a
/// corner. Resistances and voltages are straight between their ends, a VBE shift in its logarithm, a gain factor (so the base current) straight.
/// </summary>
public sealed class BoxInterior
{
    /// <summary>Number of dimensions.</summary>
    public const int DimensionCount = (int)BoxDimension.OddHfe + 1;

    private readonly ChannelModel model;
    private readonly PinSource pin;
    private readonly ChannelBox box;

    /// <summary>Opens a box.</summary>
    public BoxInterior(ChannelModel model, PinSource pin, ChannelBox box)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(pin);
        ArgumentNullException.ThrowIfNull(box);
        this.model = model;
        this.pin = pin;
        this.box = box;
        ChannelConditions c = model.Channel.Conditions;
        Corner first = box.At(0).Corner;
        List<BoxDimension> open = [];
        void Open(BoxDimension dimension, bool varies)
        {
            if (varies)
            {
                open.Add(dimension);
            }
        }

        Open(BoxDimension.Supply, box.State != ChannelState.Unfed && c.Supply.Min.Volts < c.Supply.Max.Volts);
        Open(BoxDimension.LoadDrop, box.State != ChannelState.Unfed && c.LoadDrop.Min.Volts < c.LoadDrop.Max.Volts);
        Open(BoxDimension.Ambient, box.State != ChannelState.Off && c.Ambient.Min.Kelvins < c.Ambient.Max.Kelvins);
        Open(BoxDimension.Pin, true);
        Open(BoxDimension.Feed, first.Feed != Extreme.Typical);
        Open(BoxDimension.PullDown, first.PullDown != Extreme.Typical);
        Open(BoxDimension.Sense, first.Sense != Extreme.Typical);
        Open(BoxDimension.Averaging, first.Averaging != Extreme.Typical);
        Open(BoxDimension.OddSense, first.OddSense != Extreme.Typical);
        Open(BoxDimension.OddAveraging, first.OddAveraging != Extreme.Typical);
        Open(BoxDimension.ControlVbe, first.Control.Vbe != Extreme.Typical);
        Open(BoxDimension.ControlHfe, first.Control.Hfe != Extreme.Typical);
        Open(BoxDimension.PassVbe, first.Pass.Vbe != Extreme.Typical);
        Open(BoxDimension.PassHfe, first.Pass.Hfe != Extreme.Typical);
        Open(BoxDimension.OddVbe, first.OddPass.Vbe is not (Extreme.Typical or Extreme.Match));
        Open(BoxDimension.OddHfe, first.OddPass.Hfe != Extreme.Typical);
        Dimensions = open;
    }

    /// <summary>Dimensions with width.</summary>
    public IReadOnlyList<BoxDimension> Dimensions { get; }

    /// <summary>The position of a corner, by dimension; 0 where a dimension has no width.</summary>
    public double[] PositionOf(Corner corner)
    {
        ArgumentNullException.ThrowIfNull(corner);
        ChannelConditions c = model.Channel.Conditions;
        double[] position = new double[DimensionCount];
        void Set(BoxDimension dimension, double value) => position[(int)dimension] = value;
        Set(BoxDimension.Supply, Share(c.Supply.Min.Volts, c.Supply.Max.Volts, corner.Supply));
        Set(BoxDimension.LoadDrop, Share(c.LoadDrop.Min.Volts, c.LoadDrop.Max.Volts, corner.LoadDrop));
        Set(BoxDimension.Ambient, Share(c.Ambient.Min.Kelvins, c.Ambient.Max.Kelvins, corner.Ambient));
        (double weak, double strong) = Levels();
        Set(BoxDimension.Pin, weak != strong ? Share(weak, strong, corner.PinLevel) : corner.PinResistance == 0 ? 1 : 0);
        Set(BoxDimension.Feed, Share(corner.Feed));
        Set(BoxDimension.PullDown, Share(corner.PullDown));
        Set(BoxDimension.Sense, Share(corner.Sense));
        Set(BoxDimension.Averaging, Share(corner.Averaging));
        Set(BoxDimension.OddSense, Share(corner.OddSense));
        Set(BoxDimension.OddAveraging, Share(corner.OddAveraging));
        Set(BoxDimension.ControlVbe, Share(corner.Control.Vbe));
        Set(BoxDimension.ControlHfe, Share(corner.Control.Hfe));
        Set(BoxDimension.PassVbe, Share(corner.Pass.Vbe));
        Set(BoxDimension.PassHfe, Share(corner.Pass.Hfe));
        Set(BoxDimension.OddVbe, Share(corner.OddPass.Vbe));
        Set(BoxDimension.OddHfe, Share(corner.OddPass.Hfe));
        return position;
    }

    /// <summary>The point at a position, with the heat and the coupling of a corner.</summary>
    /// <param name="index">The corner's index in the box.</param>
    /// <param name="position">Position by dimension, 0 to 1.</param>
    public BoxCorner At(int index, IReadOnlyList<double> position)
    {
        ArgumentNullException.ThrowIfNull(position);
        BoxCorner near = box.At(index);
        ChannelConditions c = model.Channel.Conditions;
        double P(BoxDimension dimension) => position[(int)dimension];
        Extreme End(Extreme own, BoxDimension dimension) =>
            own is Extreme.Typical or Extreme.Match ? own : P(dimension) switch { 0 => Extreme.Min, 1 => Extreme.Max, _ => Extreme.Inside };
        (double weak, double strong) = Levels();
        double resistance = box.State == ChannelState.Off ? pin.LowResistance : pin.WeakResistance;
        Corner k = near.Corner;
        Corner corner = k with
        {
            Supply = box.State == ChannelState.Unfed ? k.Supply : Between(c.Supply.Min.Volts, c.Supply.Max.Volts, P(BoxDimension.Supply)),
            LoadDrop = box.State == ChannelState.Unfed ? k.LoadDrop : Between(c.LoadDrop.Min.Volts, c.LoadDrop.Max.Volts, P(BoxDimension.LoadDrop)),
            Ambient = box.State == ChannelState.Off ? k.Ambient : Between(c.Ambient.Min.Kelvins, c.Ambient.Max.Kelvins, P(BoxDimension.Ambient)),
            PinLevel = Between(weak, strong, P(BoxDimension.Pin)),
            PinResistance = Between(resistance, 0, P(BoxDimension.Pin)),
            Control = new(End(k.Control.Vbe, BoxDimension.ControlVbe), End(k.Control.Hfe, BoxDimension.ControlHfe)),
            Pass = new(End(k.Pass.Vbe, BoxDimension.PassVbe), End(k.Pass.Hfe, BoxDimension.PassHfe)),
            Sense = End(k.Sense, BoxDimension.Sense),
            Averaging = End(k.Averaging, BoxDimension.Averaging),
            OddPass = new(End(k.OddPass.Vbe, BoxDimension.OddVbe), End(k.OddPass.Hfe, BoxDimension.OddHfe)),
            OddSense = End(k.OddSense, BoxDimension.OddSense),
            OddAveraging = End(k.OddAveraging, BoxDimension.OddAveraging),
            Feed = End(k.Feed, BoxDimension.Feed),
            PullDown = End(k.PullDown, BoxDimension.PullDown),
        };
        bool lowest = corner.Supply == c.Supply.Min.Volts && corner.LoadDrop == c.LoadDrop.Max.Volts;
        return new BoxCorner(corner, P(BoxDimension.Pin) == 1, near.Drop, lowest, Circuit(corner, near.Drop, P));
    }

    private SinkCircuit Circuit(Corner corner, int drop, Func<BoxDimension, double> position)
    {
        double Ohms(ResistorRange range, Extreme end, BoxDimension dimension) => end != Extreme.Inside
            ? range.At(end, corner.Ambient)
            : Between(range.At(Extreme.Min, corner.Ambient), range.At(Extreme.Max, corner.Ambient), position(dimension));
        BipolarDevice Device(TransistorVariants of, BoxDimension vbe, BoxDimension hfe) => of.Between(position(vbe), position(hfe));

        // The corner's circuit, then whatever lies inside its range put in its place.
        SinkCircuit circuit = CircuitAssembly.Build(model, corner, box.State, box.OddClass, drop);
        LegGroup[] legs = [.. circuit.Legs];
        IReadOnlyList<LegCell> cells = model.Cells(box.OddClass);
        for (int g = 0; g < cells.Count; g++)
        {
            int c = cells[g].Class;
            bool odd = cells[g].Odd;
            TransistorCorner ends = odd ? corner.OddPass : corner.Pass;
            Extreme sense = odd ? corner.OddSense : corner.Sense;
            Extreme averaging = odd ? corner.OddAveraging : corner.Averaging;
            bool inside = ends.Vbe == Extreme.Inside || ends.Hfe == Extreme.Inside || (ends.Vbe == Extreme.Match && corner.Pass.Vbe == Extreme.Inside);
            legs[g] = legs[g] with
            {
                Pass = !inside ? legs[g].Pass
                    : ends.Vbe == Extreme.Match ? model.Pass[c].MatchedBetween(position(BoxDimension.PassVbe), position(BoxDimension.OddHfe))
                    : odd ? Device(model.Pass[c], BoxDimension.OddVbe, BoxDimension.OddHfe)
                    : Device(model.Pass[c], BoxDimension.PassVbe, BoxDimension.PassHfe),
                Sense = Ohms(model.Sense[c], sense, odd ? BoxDimension.OddSense : BoxDimension.Sense),
                Averaging = model.Averaging[c] is { } range ? Ohms(range, averaging, odd ? BoxDimension.OddAveraging : BoxDimension.Averaging) : 0,
            };
        }

        return circuit with
        {
            Load = box.State == ChannelState.Unfed ? null : model.LoadAt(corner.LoadDrop),
            Control = corner.Control.Vbe == Extreme.Inside || corner.Control.Hfe == Extreme.Inside
                ? Device(model.Control, BoxDimension.ControlVbe, BoxDimension.ControlHfe)
                : circuit.Control,
            Feed = Ohms(model.Feed, corner.Feed, BoxDimension.Feed),
            PullDown = model.PullDown is { } pullDown ? Ohms(pullDown, corner.PullDown, BoxDimension.PullDown) : circuit.PullDown,
            Legs = legs,
        };
    }

    private (double Weak, double Strong) Levels() =>
        box.State == ChannelState.Off ? (pin.LowVoltage, 0) : (pin.WeakVoltage, pin.StrongVoltage);

    private static double Share(Extreme end) => end == Extreme.Max ? 1 : 0;

    private static double Share(double low, double high, double value) => high == low ? 0 : Math.Clamp((value - low) / (high - low), 0, 1);

    /// <summary>Exact at both ends.</summary>
    private static double Between(double low, double high, double share) => share == 1 ? high : low + ((high - low) * share);
}
