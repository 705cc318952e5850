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

    private const int ChannelScores = 7;
    private const int TransistorScores = 15;
    private readonly double strongVoltage;
    private readonly int ruleScores;
    private double[] scores = [];

    /// <summary>Lays out the scores.</summary>
    /// <param name="rules">Rules that read states.</param>
    /// <param name="pin">The channel's pin.</param>
    public CornerScores(int rules, PinSource pin)
    {
        ruleScores = rules * Positions;
        strongVoltage = pin.StrongVoltage;
    }

    /// <summary>Starts a state: its quantities are scored, its rules come by <see cref="Take"/>.</summary>
    public void Begin(SolvedState state)
    {
        scores = new double[ruleScores + ChannelScores + (Positions * TransistorScores)];
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

        for (int i = 0; i < state.Transistors.Count; i++)
        {
            at = ruleScores + ChannelScores + (i * TransistorScores);
            TransistorPoint point = state.Transistors[i];
            scores[at++] = point.Tj;
            scores[at++] = point.Power;
            scores[at++] = state.LowestHeadroom ? -point.Vce : double.NegativeInfinity;
            scores[at++] = point.Vce;
            if (point.Role == Role.Pass && sum > 0)
            {
                scores[at] = Share(point) / sum;
                scores[at + 1] = -Share(point) / sum;
            }

            // The current at either end of each gain window: there its guarantee ends.
            at += 2;
            TransistorCorner of = point.Role == Role.Control ? state.Corner.Control : state.Corner.Pass;
            int ends = ((of.Hfe == Extreme.Max ? 1 : 0) * 2) + (state.Corner.OddPass.Hfe == Extreme.Max ? 4 : 0);
            scores[at + ends] = point.Ic;
            scores[at + ends + 1] = -point.Ic;
        }

        for (int i = 0; i < state.Resistors.Count; i++)
        {
            scores[ruleScores + ChannelScores + (i * TransistorScores) + TransistorScores - 1] = state.Resistors[i].Voltage;
        }
    }

    /// <summary>Takes a rule's stress at a position.</summary>
    public void Take(int rule, int position, in Stress stress) => scores[(rule * Positions) + position] = stress.Severity;

    /// <summary>The scores of the state begun.</summary>
    public double[] Taken() => scores;

    private static double Share(in TransistorPoint point) => point.SenseVoltage / point.SenseResistance * point.NominalSense;
}
