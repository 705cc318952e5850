using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>Which data a rule needs from a channel's transistors and resistors; null where nothing is missing.</summary>
internal static class MissingData
{
    /// <summary>A thermal resistance, given or from Tj max and Power.</summary>
    public static string? Heat(Transistor part) =>
        part.RthJa is null && (part.TjMax is null || part.Power is null) ? "RthJA of " + part.PartNumber : null;

    /// <summary>The first transistor of the state whose heat is not known.</summary>
    public static string? Heat(SolvedState state)
    {
        foreach (TransistorPoint point in Points(state))
        {
            if (Heat(point.Part) is { } missing)
            {
                return missing;
            }
        }

        return null;
    }

    /// <summary>A guaranteed smallest gain.</summary>
    public static string? Gain(SolvedState state)
    {
        foreach (TransistorPoint point in Points(state))
        {
            if (point.Part.Card is null && !GivesGain(point.Part.Hfe?.Value))
            {
                return "hFE min of " + point.Part.PartNumber;
            }
        }

        return state.GainGuaranteed ? null : "hFE points near the leg's current";
    }

    /// <summary>A base-emitter voltage: a typical value or both ends of the window; one end alone leaves the other assumed.</summary>
    public static string? Vbe(SolvedState state)
    {
        foreach (TransistorPoint point in Points(state))
        {
            bool given = point.Part.Vbe?.Value is { Typ: not null } or { Min: not null, Max: not null };
            if (!given && point.Part.Card is null)
            {
                return "VBE of " + point.Part.PartNumber;
            }
        }

        return null;
    }

    /// <summary>A tolerance of every resistor that sets the current.</summary>
    public static string? Tolerance(SolvedState state)
    {
        for (int i = 0; i < state.Resistors.Count; i++)
        {
            ResistorPart part = state.Resistors[i].Part;
            if (part.Tolerance is null && part.Resistance.Value.Ohms > 0)
            {
                return "Tolerance of " + part.PartNumber;
            }
        }

        return null;
    }

    // By index: this runs for every corner, and an enumerator of an interface is an allocation.
    private static bool GivesGain(IReadOnlyList<HfePoint>? points)
    {
        for (int i = 0; i < points?.Count; i++)
        {
            if (points[i].Min is not null)
            {
                return true;
            }
        }

        return false;
    }

    private static TransistorPoint[] Points(SolvedState state) => (TransistorPoint[])state.Transistors;
}
