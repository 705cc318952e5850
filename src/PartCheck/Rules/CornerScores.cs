using PartCheck.Channels;
using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>
/// What a directed search climbs: the ratio of every rule at every position of a state, and the quantities at whose extremes a rule changes
/// halves (window, headroom, sharing), stops being guaranteed (pin, gain) or that a report shows. The higher the worse.
/// </summary>
internal sealed class CornerScores
{
    /// <summary>Positions of a state: up to nine transistors, up to two resistors a leg group, feed and pull-down.</summary>
    private const int Positions = 20;

    private const int Transistors = 10;
    private const int ChannelScores = 7;
    private const int TransistorScores = 8;
    private readonly ChannelModel model;
    private readonly double strongVoltage;
    private readonly int ruleScores;
    private double[] scores = [];

    /// <summary>Lays out the scores.</summary>
    /// <param name="model">The channel.</param>
    /// <param name="rules">Rules that read states.</param>
    /// <param name="pin">The channel's pin.</param>
    public CornerScores(ChannelModel model, int rules, PinSource pin)
    {
        this.model = model;
        ruleScores = rules * Positions;
        strongVoltage = pin.StrongVoltage;
    }

    /// <summary>Starts a state: its quantities are scored, its rules come by <see cref="Take"/>.</summary>
    public void Begin(SolvedState state)
    {
        scores = new double[ruleScores + ChannelScores + (Transistors * TransistorScores)];
        Array.Fill(scores, double.NegativeInfinity);
        if (!state.Solved)
        {
            return;
        }

        int at = ruleScores;
        bool strong = state.Corner.PinLevel == strongVoltage && state.Corner.PinResistance == 0;
        scores[at++] = state.LoadCurrent;
        scores[at++] = -state.LoadCurrent;
        scores[at++] = state.PinCurrent;
        scores[at++] = strong ? double.NegativeInfinity : state.PinCurrent;
        scores[at++] = state.LowestHeadroom ? -state.LoadCurrent : double.NegativeInfinity;
        scores[at++] = ChannelJudge.Heat(state);
        scores[at++] = state.Drive is { Exists: true } drive ? (drive.Factor * drive.SumBaseCurrent) - drive.Available : double.NegativeInfinity;
        double sum = 0;
        foreach (TransistorPoint point in (TransistorPoint[])state.Transistors)
        {
            sum += point.Role == Role.Pass ? point.Count * Share(point) : 0;
        }

        bool several = state.Transistors.Count > 2;
        bool oddSeen = false;
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            at = ruleScores + ChannelScores + (i * TransistorScores);
            TransistorPoint point = state.Transistors[i];
            scores[at++] = point.Tj;
            scores[at++] = state.LowestHeadroom ? -point.Vce : double.NegativeInfinity;

            // Where the current leaves the gain points of the corner's own end of the window, its guarantee ends.
            bool odd = !oddSeen && point.Role == Role.Pass && model.Slots.Of(point.Slot)[0].Reference == state.Corner.OddLeg;
            oddSeen |= odd;
            TransistorCorner of = point.Role == Role.Control ? state.Corner.Control : odd ? state.Corner.OddPass : state.Corner.Pass;
            double logIc = Math.Log(Math.Max(point.Ic, 1e-30));
            int end = of.Hfe == Extreme.Max ? 2 : 0;
            scores[at + end] = logIc;
            scores[at + end + 1] = -logIc;
            at += 4;
            if (point.Role == Role.Pass && several && sum > 0)
            {
                scores[at] = Share(point) / sum;
                scores[at + 1] = -Share(point) / sum;
            }
        }
    }

    /// <summary>Takes a rule's stress at a position.</summary>
    public void Take(int rule, int position, in Stress stress)
    {
        // Positions beyond the room for them (LEDs of many kinds) follow the load current, which is scored by itself.
        if (position < Positions)
        {
            scores[(rule * Positions) + position] = stress.Severity;
        }
    }

    /// <summary>The scores of the state begun.</summary>
    public double[] Taken() => scores;

    private static double Share(in TransistorPoint point) => point.SenseVoltage / point.SenseResistance * point.NominalSense;
}
