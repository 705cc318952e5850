using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;

namespace PartCheck.Tests.Rules;

/// <summary>Solved states written by hand, so that a rule is tested apart from the solver.</summary>
internal static class States
{
    public static readonly BoundChannel Channel = SampleChannel.Channel(1);

    /// <summary>A transistor whose row gives nothing: nobody asks for anything.</summary>
    public static readonly Transistor BareTransistor = new() { PartNumber = "TQ-99", Cell = "parts.csv!A99" };

    public static SolvedState Of(
        TransistorPoint? pass = null, ResistorPoint? resistor = null, double celsius = 25, ChannelState state = ChannelState.On, double load = 0.02,
        double baseNode = 1.3, bool lowest = false, DriveEdge? drive = null, bool pinHolds = true, bool gainHolds = true, double pinLevel = 5.25) => new()
        {
            State = state,
            Corner = new Corner { Supply = 25.2, LoadDrop = 16, Ambient = celsius + 273.15, PinLevel = pinLevel, PinResistance = 0, Heat = 1 },
            BaseVoltage = baseNode,
            LoadCurrent = load,
            LowestHeadroom = lowest,
            Drive = drive,
            PinGuaranteed = pinHolds,
            GainGuaranteed = gainHolds,
            Transistors = pass is { } p ? new[] { p } : [],
            Resistors = resistor is { } r ? [r] : [],
        };

    public static TransistorPoint Pass(
        Transistor? part = null, Role role = Role.Pass, double vce = 5, double vcb = 4, double ic = 0.02, double power = 0.1, double tj = 60, bool held = false) =>
        new(0, role, part ?? SampleChannel.Transistor(), vce, vcb, ic, ic / 150, power, tj + 273.15, held);

    public static ResistorPoint Resistor(ResistorPart part, double volts, double amperes) =>
        new(0, Role.Sense, part, part.Resistance.Value.Ohms, volts, amperes);

    public static Stress Judge(TransistorRule rule, SolvedState state, DeratingRow? row = null, BoundChannel? channel = null) =>
        rule.Evaluate(state, state.Transistors[0], channel ?? Channel, Rows(rule, row));

    public static Stress Judge(ResistorRule rule, SolvedState state, DeratingRow? row = null, DeratingRow? power = null) =>
        rule.Evaluate(state, state.Resistors[0], Channel, new RuleRows(row ?? Row(rule.Id), power ?? row ?? Row("r-power")));

    public static Stress Judge(LedRule rule, SolvedState state, LedPart part, DeratingRow row, BoundChannel? channel = null) =>
        rule.Evaluate(state, part, channel ?? Channel, Rows(rule, row));

    public static Stress Judge(ChannelRule rule, SolvedState state, BoundChannel? channel = null) =>
        rule.Evaluate(state, channel ?? Channel, Rows(rule, null));

    /// <summary>The state of several legs, the odd one first.</summary>
    public static SolvedState OfLegs(Extreme oddVbe, params TransistorPoint[] legs)
    {
        SolvedState one = Of();
        return new SolvedState
        {
            State = ChannelState.On,
            Corner = one.Corner with { OddPass = new TransistorCorner(oddVbe, Extreme.Min) },
            Transistors = legs,
            Resistors = [],
        };
    }

    public static Stress Judge(ChannelRule rule, SolvedState state, DeratingRow row, BoundChannel channel) =>
        rule.Evaluate(state, channel, Rows(rule, row));

    public static bool Asks(TransistorRule rule, Transistor part, BoundChannel channel) => rule.AppliesTo(Role.Pass) && rule.Asked(part, channel, Rows(rule, null));

    public static bool Asks(ResistorRule rule, ResistorPart part) => rule.AppliesTo(part);

    /// <summary>A resistor whose row gives its resistance alone.</summary>
    public static ResistorPart BareResistor(double ohms) =>
        new() { PartNumber = "RK-99", Cell = "parts.csv!A99", Resistance = Cite(Resistance.FromOhms(ohms)) };

    public static bool Asks(ChannelRule rule, BoundChannel channel, DeratingRow? row = null) => rule.Asked(channel, Rows(rule, row));

    public static DeratingRow Row(string rule, double factor = 1, double offset = 0, double? cap = null, ZeroTemperature zero = ZeroTemperature.Rated) => new()
    {
        Rule = rule,
        Factor = factor,
        Offset = TemperatureDelta.FromKelvins(offset),
        Cap = cap is { } c ? Temperature.FromCelsius(c) : null,
        Zero = zero,
        Source = "test",
    };

    public static Cited<T> Cite<T>(T value) => new(value, "parts.csv!K2");

    private static RuleRows Rows(Rule rule, DeratingRow? row) => new(row ?? Row(rule.Id), Row("r-power"));
}
