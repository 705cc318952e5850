using PartCheck.Channels;

namespace PartCheck.OperatingPoints;

/// <summary>Legs with the same parts and the same beside them in their packages: what holds for one of them holds for all.</summary>
/// <param name="Legs">The legs, in channel order.</param>
public sealed record LegClass(IReadOnlyList<Leg> Legs)
{
    /// <summary>One of them.</summary>
    public Leg First => Legs[0];

    /// <summary>Groups a channel's legs.</summary>
    public static IReadOnlyList<LegClass> Of(BoundChannel channel, PackageHeat heat)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(heat);
        int[] colours = new int[channel.Legs.Count];
        for (int i = 0; i < colours.Length; i++)
        {
            // An element of another channel has a power of its own.
            int like = Enumerable.Range(0, i).FirstOrDefault(j => SameParts(channel.Legs[j], channel.Legs[i]) && heat.NeighbourPower(j + 1).Equals(heat.NeighbourPower(i + 1)), -1);
            colours[i] = like < 0 ? i : colours[like];
        }

        int[] refined = LegPartition.Refined(colours, heat);
        return [.. Enumerable.Range(0, colours.Length).GroupBy(i => refined[i]).Select(g => new LegClass([.. g.Select(i => channel.Legs[i])]))];
    }

    private static bool SameParts(Leg a, Leg b) =>
        ReferenceEquals(a.Pass.Part, b.Pass.Part)
        && ReferenceEquals(a.Sense.Part, b.Sense.Part)
        && ReferenceEquals(a.Averaging?.Part, b.Averaging?.Part)
        && a.Sensed == b.Sensed;
}

/// <summary>Slots of a channel: which placements a solved point stands for.</summary>
public sealed class Slots
{
    private readonly List<IReadOnlyList<Placement>> placements = [];

    /// <summary>Lays out the slots of a channel.</summary>
    public Slots(BoundChannel channel, IReadOnlyList<LegClass> classes)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(classes);
        foreach (LegClass c in classes)
        {
            placements.Add([.. c.Legs.Select(l => l.Pass)]);
            placements.Add([.. c.Legs.Select(l => l.Sense)]);
            placements.Add([.. c.Legs.Where(l => l.Averaging is not null).Select(l => l.Averaging!)]);
        }

        Control = placements.Count;
        placements.Add([channel.Control]);
        Feed = placements.Count;
        placements.Add([channel.Feed]);
        PullDown = placements.Count;
        placements.Add(channel.PullDown is null ? [] : [channel.PullDown]);
        FirstLed = placements.Count;
        placements.AddRange(channel.Leds.GroupBy(p => p.Part, ReferenceEqualityComparer.Instance).Select(g => (IReadOnlyList<Placement>)[.. g]));
    }

    /// <summary>Number of slots.</summary>
    public int Count => placements.Count;

    /// <summary>Slot of the control transistor.</summary>
    public int Control { get; }

    /// <summary>Slot of the feed resistor.</summary>
    public int Feed { get; }

    /// <summary>Slot of the pull-down resistor.</summary>
    public int PullDown { get; }

    /// <summary>First slot of the load's LEDs, one slot for each part, up to <see cref="Count"/>.</summary>
    public int FirstLed { get; }

    /// <summary>Slot of a leg class's pass transistor.</summary>
    public static int Pass(int legClass) => 3 * legClass;

    /// <summary>Slot of a leg class's sense resistor.</summary>
    public static int Sense(int legClass) => (3 * legClass) + 1;

    /// <summary>Slot of a leg class's averaging resistor.</summary>
    public static int Averaging(int legClass) => (3 * legClass) + 2;

    /// <summary>The placements of a slot.</summary>
    public IReadOnlyList<Placement> Of(int slot) => placements[slot];
}
