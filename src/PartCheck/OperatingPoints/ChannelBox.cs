using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>
/// What varies in one channel, in one state, with one leg class giving the odd leg: the mixed-radix index of a corner and
/// the corner's circuit. Dimensions of zero width are dropped. The pin, the feed and the pull-down vary fastest: the edge of
/// regulation does not depend on them.
/// </summary>
public sealed class ChannelBox
{
    private static readonly Extreme[] Ends = [Extreme.Min, Extreme.Max];
    private static readonly Extreme[] Fixed = [Extreme.Typical];

    private readonly ChannelModel model;
    private readonly PinSource pin;
    private readonly double[] ambients;
    private readonly HeatCorner[] heats;
    private readonly Extreme[] controlVbe;
    private readonly Extreme[] controlHfe;
    private readonly Extreme[] passVbe;
    private readonly Extreme[] passHfe;
    private readonly Extreme[] sense;
    private readonly Extreme[] averaging;
    private readonly Extreme[] oddVbe;
    private readonly Extreme[] oddHfe;
    private readonly Extreme[] oddSense;
    private readonly Extreme[] oddAveraging;
    private readonly double[] supplies;
    private readonly int[] drops;
    private readonly bool[] strong;
    private readonly Extreme[] feed;
    private readonly Extreme[] pullDown;

    /// <summary>Lays out a box.</summary>
    /// <param name="model">The channel.</param>
    /// <param name="pin">Its pin.</param>
    /// <param name="state">On, off (hottest ambient, nothing heats itself) or unfed.</param>
    /// <param name="oddClass">Leg class of the odd leg; -1: one leg only, none is odd.</param>
    /// <param name="matched">True: the odd leg's VBE is one lot's match away from the rest's, not anywhere in the window.</param>
    public ChannelBox(ChannelModel model, PinSource pin, ChannelState state, int oddClass, bool matched = false)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(pin);
        this.model = model;
        this.pin = pin;
        State = state;
        OddClass = oddClass;
        ChannelConditions c = model.Channel.Conditions;
        bool on = state != ChannelState.Unfed;
        bool off = state == ChannelState.Off;
        ambients = off ? [c.Ambient.Max.Kelvins] : Ambients();
        heats = [.. HeatCorner.Of(model, off)];

        // Each dimension spans the rest of the legs; a class with the odd leg alone in the channel has no rest.
        bool rest = oddClass < 0 || model.Channel.Legs.Count > 1;
        controlVbe = When(model.Control.VbeVaries);
        controlHfe = When(model.Control.GainVaries);
        passVbe = When(rest && model.Pass.Any(p => p.VbeVaries));
        passHfe = When(rest && model.Pass.Any(p => p.GainVaries));
        sense = When(rest && model.Sense.Any(r => r.Varies));
        averaging = When(rest && model.Averaging.Any(r => r is { Varies: true }));
        bool odd = oddClass >= 0;
        oddVbe = matched ? [Extreme.Match] : When(odd && model.Pass[Math.Max(oddClass, 0)].VbeVaries);
        oddHfe = When(odd && model.Pass[Math.Max(oddClass, 0)].GainVaries);
        oddSense = When(odd && model.Sense[Math.Max(oddClass, 0)].Varies);
        oddAveraging = When(odd && model.Averaging[Math.Max(oddClass, 0)] is { Varies: true });
        supplies = on ? Both(c.Supply.Min.Volts, c.Supply.Max.Volts) : [c.Supply.Max.Volts];
        drops = on && c.LoadDrop.Min.Volts < c.LoadDrop.Max.Volts ? [0, 1] : [1];
        strong = [false, true];
        feed = When(model.Feed.Varies);
        pullDown = When(model.PullDown is { Varies: true });
        InnerCount = strong.Length * feed.Length * pullDown.Length;
        Count = checked(InnerCount * drops.Length * supplies.Length * oddAveraging.Length * oddSense.Length * oddHfe.Length
            * oddVbe.Length * averaging.Length * sense.Length * passHfe.Length * passVbe.Length * controlHfe.Length
            * controlVbe.Length * heats.Length * ambients.Length);
    }

    /// <summary>On or unfed.</summary>
    public ChannelState State { get; }

    /// <summary>Leg class of the odd leg; -1: none.</summary>
    public int OddClass { get; }

    /// <summary>Corners in the box.</summary>
    public int Count { get; }

    /// <summary>Consecutive corners that share all but pin, feed and pull-down.</summary>
    public int InnerCount { get; }

    /// <summary>The corner at an index.</summary>
    public BoxCorner At(int index)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual((uint)index, (uint)Count, nameof(index));
        int left = index;
        T Digit<T>(T[] values)
        {
            T value = values[left % values.Length];
            left /= values.Length;
            return value;
        }

        bool isStrong = Digit(strong);
        Extreme feedEnd = Digit(feed);
        Extreme pullDownEnd = Digit(pullDown);
        int drop = Digit(drops);
        double supply = Digit(supplies);
        Extreme oddA = Digit(oddAveraging);
        Extreme oddS = Digit(oddSense);
        Extreme oddH = Digit(oddHfe);
        Extreme oddV = Digit(oddVbe);
        Extreme a = Digit(averaging);
        Extreme s = Digit(sense);
        Extreme ph = Digit(passHfe);
        Extreme pv = Digit(passVbe);
        Extreme ch = Digit(controlHfe);
        Extreme cv = Digit(controlVbe);
        HeatCorner heat = Digit(heats);
        double ambient = Digit(ambients);
        ChannelConditions c = model.Channel.Conditions;
        Corner corner = new()
        {
            Supply = supply,
            LoadDrop = drop == 0 ? c.LoadDrop.Min.Volts : c.LoadDrop.Max.Volts,
            Ambient = ambient,
            PinLevel = State == ChannelState.Off ? (isStrong ? 0 : pin.LowVoltage) : isStrong ? pin.StrongVoltage : pin.WeakVoltage,
            PinResistance = isStrong ? 0 : State == ChannelState.Off ? pin.LowResistance : pin.WeakResistance,
            Heat = heat.Heat,
            Control = new TransistorCorner(cv, ch),
            Pass = new TransistorCorner(pv, ph),
            Sense = s,
            Averaging = a,
            OddLeg = OddClass < 0 ? null : model.Classes[OddClass].First.Pass.Reference,
            OddPass = new TransistorCorner(oddV, oddH),
            OddSense = oddS,
            OddAveraging = oddA,
            Feed = feedEnd,
            PullDown = pullDownEnd,
            AssumedCoupling = heat.Coupling,
            AssumedPackageCoupling = heat.PackageCoupling,
            NeighboursOn = heat.NeighboursOn,
        };
        return new BoxCorner(corner, isStrong, drop, supply == c.Supply.Min.Volts && drop == 1, CircuitAssembly.Build(model, corner, State, OddClass, drop));
    }

    private double[] Ambients()
    {
        ChannelConditions c = model.Channel.Conditions;
        double low = c.Ambient.Min.Kelvins;
        double high = c.Ambient.Max.Kelvins;
        IEnumerable<Part> parts = model.Pass.Append(model.Control).Select(t => (Part)t.Part)
            .Concat(model.Sense.Concat(model.Averaging.OfType<ResistorRange>()).Append(model.Feed).Select(r => r.Part))
            .Concat(model.PullDown is null ? [] : [model.PullDown.Part])
            .Concat(model.Channel.Leds.Select(l => l.Part));

        // Knees: ambients inside the range where a rated power (an LED's rated current) starts to fall.
        return [.. parts.Select(p => p.FlatTo.Kelvins).Where(t => t > low && t < high).Append(low).Append(high).Distinct().Order()];
    }

    private static Extreme[] When(bool varies) => varies ? Ends : Fixed;

    private static double[] Both(double low, double high) => low < high ? [low, high] : [low];
}

/// <summary>One corner with its circuit.</summary>
/// <param name="Corner">The corner.</param>
/// <param name="Strong">True where the pin is strong.</param>
/// <param name="Drop">0: smallest load drop, 1: largest.</param>
/// <param name="LowestHeadroom">True at minimum supply and maximum drop.</param>
/// <param name="Circuit">The circuit.</param>
public readonly record struct BoxCorner(Corner Corner, bool Strong, int Drop, bool LowestHeadroom, SinkCircuit Circuit);
