using PartCheck.OperatingPoints;

namespace PartCheck.Rules;

/// <summary>What a finding was judged from, so that its derivation can be written down: the worst state, the rule and the rows it read.</summary>
/// <param name="Model">The channel's model.</param>
/// <param name="Pin">The pin as the channel saw it.</param>
/// <param name="Rule">The rule.</param>
/// <param name="Rows">Derating rows that it read.</param>
/// <param name="State">The worst state.</param>
/// <param name="Slot">Slot of the part judged; the number of slots for a channel rule.</param>
/// <param name="Stress">What the rule said of that state.</param>
public sealed record FindingBasis(
    ChannelModel Model, PinSource Pin, Rule Rule, RuleRows Rows, SolvedState State, int Slot, Stress Stress)
{
    /// <summary>Index, among the state's transistors (resistors), of the point that the rule judged; -1: the channel as a whole.</summary>
    public int Point
    {
        get
        {
            for (int i = 0; Rule is TransistorRule && i < State.Transistors.Count; i++)
            {
                if (State.Transistors[i].Slot == Slot && ((TransistorRule)Rule).Evaluate(State, State.Transistors[i], Model.Channel, Rows) == Stress)
                {
                    return i;
                }
            }

            for (int i = 0; Rule is ResistorRule && i < State.Resistors.Count; i++)
            {
                if (State.Resistors[i].Slot == Slot && ((ResistorRule)Rule).Evaluate(State, State.Resistors[i], Model.Channel, Rows) == Stress)
                {
                    return i;
                }
            }

            return -1;
        }
    }
}
