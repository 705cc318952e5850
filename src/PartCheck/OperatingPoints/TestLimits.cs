using PartCheck.Channels;
using PartCheck.Parts;
using PartCheck.Quantities;

namespace PartCheck.OperatingPoints;

/// <summary>A range of one measured value, SI.</summary>
/// <param name="Min">Smallest.</param>
/// <param name="Max">Largest.</param>
public readonly record struct ValueRange(double Min, double Max)
{
    /// <summary>A range that holds nothing yet.</summary>
    public static ValueRange Empty { get; } = new(double.PositiveInfinity, double.NegativeInfinity);

    /// <summary>The range that holds a further value, too.</summary>
    public ValueRange With(double value) => new(Math.Min(Min, value), Math.Max(Max, value));

    /// <summary>The range that holds both.</summary>
    public ValueRange Union(ValueRange other) => new(Math.Min(Min, other.Min), Math.Max(Max, other.Max));
}

/// <summary>
/// What a good channel measures on the bench: supply at the mean of Supply min and max, 25 degC, from just switched on to warm,
/// everything else over its range, elements of other channels in its packages off. Under PWM the values are those while on, warm means as warm
/// as Duty max makes it. SI units; the sense voltage over all legs.
/// </summary>
/// <param name="Supply">Supply to set [V].</param>
/// <param name="BaseVoltage">Base node [V].</param>
/// <param name="SenseVoltage">Voltage over a sense resistor [V].</param>
/// <param name="CollectorVoltage">Low end of the load [V].</param>
/// <param name="LoadCurrent">Load current [A].</param>
public sealed record TestLimits(
    double Supply, ValueRange BaseVoltage, ValueRange SenseVoltage, ValueRange CollectorVoltage, ValueRange LoadCurrent)
{
    /// <summary>Ambient temperature at which they hold [K].</summary>
    public const double Ambient = PhysicalConstants.RoomTemperature;

    /// <summary>Solves the limits of a reading; null where a corner could not be solved.</summary>
    /// <param name="channel">The reading.</param>
    /// <param name="variants">Devices of a transistor's row.</param>
    /// <param name="pin">Its pin.</param>
    /// <param name="threads">Threads to use; 0: all.</param>
    /// <param name="cancel">Stops the enumeration.</param>
    public static TestLimits? Of(
        BoundChannel channel, Func<Transistor, TransistorVariants> variants, PinSource pin, int threads, CancellationToken cancel)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ChannelConditions c = channel.Conditions;
        Voltage supply = Voltage.FromVolts((c.Supply.Min.Volts + c.Supply.Max.Volts) / 2);
        Temperature ambient = Temperature.FromKelvins(Ambient);
        ChannelModel model = new(channel with { Conditions = c with { Supply = new(supply, supply), Ambient = new(ambient, ambient) } }, variants);
        IReadOnlyList<Collected> chunks = WorstCase.Enumerate(
            model, pin, WorstCase.OnBoxes(model, pin), edge: null, threads, () => new Collected(), (into, state) => into.Take(state), cancel);
        Collected all = new();
        foreach (Collected chunk in chunks)
        {
            all.Merge(chunk);
        }

        return all.Solved ? new TestLimits(supply.Volts, all.Base, all.Sense, all.Collector, all.Load) : null;
    }

    /// <summary>The limits that hold for either of two readings.</summary>
    public TestLimits Union(TestLimits other)
    {
        ArgumentNullException.ThrowIfNull(other);
        return new TestLimits(
            Supply, BaseVoltage.Union(other.BaseVoltage), SenseVoltage.Union(other.SenseVoltage),
            CollectorVoltage.Union(other.CollectorVoltage), LoadCurrent.Union(other.LoadCurrent));
    }

    private sealed class Collected
    {
        public bool Solved { get; private set; } = true;

        public ValueRange Base { get; private set; } = ValueRange.Empty;

        public ValueRange Sense { get; private set; } = ValueRange.Empty;

        public ValueRange Collector { get; private set; } = ValueRange.Empty;

        public ValueRange Load { get; private set; } = ValueRange.Empty;

        public void Take(SolvedState state)
        {
            if (!state.Solved)
            {
                Solved = false;
                return;
            }

            Base = Base.With(state.BaseVoltage);
            Collector = Collector.With(state.CollectorVoltage);
            Load = Load.With(state.LoadCurrent);
            for (int i = 0; i < state.Transistors.Count; i++)
            {
                if (state.Transistors[i].Role == Role.Pass)
                {
                    Sense = Sense.With(state.Transistors[i].SenseVoltage);
                }
            }
        }

        public void Merge(Collected later)
        {
            Solved &= later.Solved;
            Base = Base.Union(later.Base);
            Sense = Sense.Union(later.Sense);
            Collector = Collector.Union(later.Collector);
            Load = Load.Union(later.Load);
        }
    }
}
