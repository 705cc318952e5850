using PartCheck.Channels;
using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>What the states of a reading come to: the worst of every rule at every slot, and the extremes of what is reported beside.</summary>
internal sealed class ReadingWorst(int rules, int slots)
{
    private readonly Worst?[] worst = new Worst?[rules * slots];

    public int Corners { get; set; }

    public int NotSolved { get; set; }

    public SolvedState? LeastLoad { get; private set; }

    public SolvedState? MostLoad { get; private set; }

    public SolvedState? MostPin { get; private set; }

    public SolvedState? MostHeat { get; private set; }

    public double LoadMin => LeastLoad?.LoadCurrent ?? double.PositiveInfinity;

    public double LoadMax => MostLoad?.LoadCurrent ?? double.NegativeInfinity;

    public double PinMax => Math.Max(0, MostPin?.PinCurrent ?? 0);

    public double HeatMax { get; private set; }

    public bool ControlHeld { get; private set; }

    public double[] Hottest { get; } = new double[slots];

    public double[] MostPower { get; } = new double[slots];

    /// <summary>The pin's current of every state; of those on load current, heat, each transistor's junction and dissipation.</summary>
    public void TakeExtremes(SolvedState state)
    {
        TakePin(state);
        if (state.State != ChannelState.On)
        {
            return;
        }

        TakeLoad(state);
        TakeHeat(state, Heat(state));
        ControlHeld |= !state.ControlGainGuaranteed;
        foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
        {
            Hottest[point.Slot] = Math.Max(Hottest[point.Slot], point.Tj);
            MostPower[point.Slot] = Math.Max(MostPower[point.Slot], point.Power * point.AveragedShare);
        }
    }

    public Worst At(int rule, int slot) => worst[(rule * slots) + slot] ??= new Worst();

    public void Merge(ReadingWorst later)
    {
        Corners += later.Corners;
        NotSolved += later.NotSolved;
        if (later.MostPin is { } pin)
        {
            TakePin(pin);
        }

        if (later is { LeastLoad: { } least, MostLoad: { } most, MostHeat: { } hot })
        {
            TakeLoad(least);
            TakeLoad(most);
            TakeHeat(hot, later.HeatMax);
        }

        ControlHeld |= later.ControlHeld;
        for (int s = 0; s < slots; s++)
        {
            Hottest[s] = Math.Max(Hottest[s], later.Hottest[s]);
            MostPower[s] = Math.Max(MostPower[s], later.MostPower[s]);
        }

        for (int i = 0; i < worst.Length; i++)
        {
            if (later.worst[i] is { } other)
            {
                (worst[i] ??= new Worst()).Merge(other);
            }
        }
    }

    private void TakePin(SolvedState state) => MostPin = MostPin is null || state.PinCurrent > MostPin.PinCurrent ? state : MostPin;

    private void TakeLoad(SolvedState state)
    {
        LeastLoad = LeastLoad is null || state.LoadCurrent < LeastLoad.LoadCurrent ? state : LeastLoad;
        MostLoad = MostLoad is null || state.LoadCurrent > MostLoad.LoadCurrent ? state : MostLoad;
    }

    private void TakeHeat(SolvedState state, double heat)
    {
        if (MostHeat is null || heat > HeatMax)
        {
            (MostHeat, HeatMax) = (state, heat);
        }
    }

    /// <summary>Heat while on of everything on the board that belongs to the channel, the load left out [W].</summary>
    public static double Heat(SolvedState state)
    {
        double sum = 0;
        foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
        {
            sum += point.Power * (point.Role == Role.Pass ? point.Count : 1);
        }

        for (int i = 0; i < state.Resistors.Count; i++)
        {
            sum += state.Resistors[i].Power * state.Resistors[i].Count;
        }

        return sum;
    }
}
