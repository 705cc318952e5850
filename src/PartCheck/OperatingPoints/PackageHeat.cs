using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>
/// Transistors of one package heat each other. With P1 and P2 the powers of two elements, Tj1 = Ta + P1 RthJA + P2 C [K]. RthJA both is
/// the rise over the sum of the powers where all n elements take the same, Tj = Ta + n P RthJA both, so that
/// C = (n RthJA both - RthJA)/(n - 1) [K/W]; of two elements 2 RthJA both - RthJA. Without RthJA both, C lies between 0 (nothing passes)
/// and RthJA (one piece of copper): both are corners. An element of another channel is off, or on at the highest dissipation that its
/// own channel, solved alone, puts into it.
/// </summary>
public sealed class PackageHeat
{
    private readonly Transistor[] parts;
    private readonly List<int>[] partners;
    private readonly double[] neighbourPower;

    /// <summary>Finds who shares a package in a channel.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="powers">Highest dissipation of elements in other channels by reference [W]; null: they are off.</param>
    public PackageHeat(BoundChannel channel, IReadOnlyDictionary<string, double>? powers)
    {
        ArgumentNullException.ThrowIfNull(channel);
        List<Placement> devices = [channel.Control, .. channel.Legs.Select(l => l.Pass)];
        parts = [.. devices.Select(d => (Transistor)d.Part)];
        partners = [.. devices.Select((d, i) => Enumerable.Range(0, devices.Count).Where(j => j != i && SamePackage(d, devices[j])).ToList())];
        neighbourPower = [.. devices.Select(d => powers is null ? 0 : channel.Neighbours
            .Where(n => string.Equals(n.Own, d.Reference, StringComparison.OrdinalIgnoreCase))
            .Sum(n => powers.GetValueOrDefault(n.Other, double.NaN)))];
        HasNeighbours = powers is not null && channel.Neighbours.Count > 0;
        Missing = HasNeighbours && channel.Neighbours.FirstOrDefault(n => !double.IsFinite(powers!.GetValueOrDefault(n.Other, double.NaN))) is { } unknown
            ? $"dissipation of {unknown.Other} in channel {unknown.Channel}" : null;
        HasPartners = partners.Any(p => p.Count > 0);
        Shares = HasNeighbours || HasPartners;
        Given = Sharing.All(p => p.RthJaBoth is not null);
    }

    /// <summary>True where elements of the channel's packages serve other channels, and these are on in some corners.</summary>
    public bool HasNeighbours { get; }

    /// <summary>What is not known of an element in another channel; null: nothing.</summary>
    public string? Missing { get; }

    /// <summary>True where transistors of this channel share a package.</summary>
    public bool HasPartners { get; }

    /// <summary>True where any transistor of the channel shares its package with one that is on.</summary>
    public bool Shares { get; }

    /// <summary>True where the table gives RthJA both of every package that is shared.</summary>
    public bool Given { get; }

    /// <summary>Parts whose packages are shared, each once.</summary>
    public IEnumerable<Transistor> Sharing =>
        parts.Where((_, d) => partners[d].Count > 0 || (HasNeighbours && neighbourPower[d] is not 0)).Distinct();

    /// <summary>Transistors of this channel in the same package as one: 0 the control, from 1 the legs in order.</summary>
    public IReadOnlyList<int> Partners(int device) => partners[device];

    /// <summary>True where a leg, from 0, shares its package with the control.</summary>
    public bool WithControl(int leg) => partners[leg + 1].Contains(0);

    /// <summary>Power of the other channels' elements in a transistor's package, when they are on [W].</summary>
    public double NeighbourPower(int device) => neighbourPower[device];

    /// <summary>True where a transistor shares its package with another that is on in some corner.</summary>
    public bool IsShared(int device) => partners[device].Count > 0 || neighbourPower[device] > 0;

    /// <summary>C: heating of one element's junction by the power of another [K/W].</summary>
    /// <param name="part">The part.</param>
    /// <param name="rth">Its RthJA, one element on [K/W].</param>
    /// <param name="assumedShare">Share of RthJA to take where RthJA both is missing [-].</param>
    public static double Coupling(Transistor part, double rth, double assumedShare)
    {
        ArgumentNullException.ThrowIfNull(part);
        return part.RthJaBoth is { } both
            ? Math.Clamp(((part.Elements * both.Value.KelvinsPerWatt) - rth) / (part.Elements - 1), 0, rth)
            : assumedShare * rth;
    }

    private static bool SamePackage(Placement a, Placement b) =>
        a is { Part: Transistor { Elements: > 1 }, Element: not null } && string.Equals(a.Package, b.Package, StringComparison.OrdinalIgnoreCase);
}
