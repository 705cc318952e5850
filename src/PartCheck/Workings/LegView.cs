using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>One leg group of a solved state with what the corner made of it.</summary>
/// <param name="Index">Index among the state's transistors.</param>
/// <param name="Class">Its leg class.</param>
/// <param name="Odd">True for the odd leg.</param>
/// <param name="N">What stands after its symbols: nothing where the channel has one leg group.</param>
/// <param name="Who">References, in words.</param>
internal sealed record LegView(int Index, int Class, bool Odd, string N, string Who)
{
    /// <summary>The leg groups of a state.</summary>
    public static IReadOnlyList<LegView> Of(ChannelModel model, SolvedState state)
    {
        List<LegView> legs = [];
        HashSet<int> seen = [];
        for (int i = 0; i < state.Transistors.Count; i++)
        {
            if (state.Transistors[i].Role != Role.Pass)
            {
                continue;
            }

            int c = state.Transistors[i].Slot / 3;
            bool odd = seen.Add(c) && state.Corner.OddLeg is { } reference && model.Classes[c].Legs.Any(l => l.Pass.Reference == reference);
            string[] references = [.. model.Classes[c].Legs.Select(l => l.Pass.Reference)];
            string who = state.Index < 0 && state.Transistors.Count > 2 ? model.Channel.Legs[i].Pass.Reference
                : odd ? state.Corner.OddLeg! + ", the odd leg"
                : state.Corner.OddLeg is { } other && references.Contains(other) ? "the rest of " + string.Join(", ", references)
                : string.Join(", ", references);
            legs.Add(new LegView(i, c, odd, Derivation.SubjectOf(state, i), who));
        }

        return legs;
    }

    /// <summary>The device in this corner.</summary>
    public BipolarDevice Device(ChannelModel model, SolvedState state)
    {
        Corner corner = state.Corner;
        TransistorCorner ends = Odd ? corner.OddPass : corner.Pass;
        return state.Circuit is { } circuit && (ends.Vbe == Extreme.Inside || ends.Hfe == Extreme.Inside || corner.Pass.Vbe == Extreme.Inside) ? circuit.Legs[Index].Pass
            : state.Index < 0 ? model.Pass[Class].Nominal
            : !Odd ? model.Pass[Class].At(corner.Pass)
            : corner.OddPass.Vbe == Extreme.Match ? model.Pass[Class].Matched(corner.Pass.Vbe, corner.OddPass.Hfe)
            : model.Pass[Class].At(corner.OddPass);
    }
}
