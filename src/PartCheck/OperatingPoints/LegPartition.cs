using System.Globalization;
using PartCheck.Channels;

namespace PartCheck.OperatingPoints;

/// <summary>Legs that are alike in a corner: same class, and their package partners are alike, too.</summary>
/// <param name="Class">Leg class.</param>
/// <param name="Odd">True for the odd leg.</param>
/// <param name="Legs">The legs, by index in the channel.</param>
public sealed record LegCell(int Class, bool Odd, IReadOnlyList<int> Legs);

/// <summary>Splits legs into cells of which every member sees the same around it, so that one is solved and counted for all.</summary>
public static class LegPartition
{
    /// <summary>The cells of a channel with one odd leg, in the order of the classes, the odd leg before the rest of its class.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="classes">Its leg classes.</param>
    /// <param name="heat">Who shares a package.</param>
    /// <param name="oddClass">Class whose first leg is the odd one; -1: none.</param>
    public static IReadOnlyList<LegCell> Of(BoundChannel channel, IReadOnlyList<LegClass> classes, PackageHeat heat, int oddClass)
    {
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(classes);
        ArgumentNullException.ThrowIfNull(heat);
        int[] classOf = [.. channel.Legs.Select(leg => Enumerable.Range(0, classes.Count).First(c => classes[c].Legs.Contains(leg)))];
        bool IsOdd(int leg) => classOf[leg] == oddClass && ReferenceEquals(classes[oddClass].First, channel.Legs[leg]);
        int[] colours = Refined([.. Enumerable.Range(0, channel.Legs.Count).Select(i => (2 * classOf[i]) + (IsOdd(i) ? 0 : 1))], heat);
        return [.. Enumerable.Range(0, channel.Legs.Count).GroupBy(i => colours[i])
            .Select(g => new LegCell(classOf[g.First()], IsOdd(g.First()), [.. g]))
            .OrderBy(c => c.Class).ThenBy(c => c.Odd ? 0 : 1).ThenBy(c => c.Legs[0])];
    }

    /// <summary>Colours split until legs of one colour have partners of the same colours.</summary>
    internal static int[] Refined(int[] colours, PackageHeat heat)
    {
        int[] now = colours;
        while (true)
        {
            Dictionary<string, int> ids = new(StringComparer.Ordinal);
            int[] next = new int[now.Length];
            for (int i = 0; i < now.Length; i++)
            {
                IEnumerable<int> around = heat.Partners(i + 1).Select(p => p == 0 ? -1 : now[p - 1]).Order();
                string key = string.Create(CultureInfo.InvariantCulture, $"{now[i]}:{string.Join(',', around)}");
                ids.TryAdd(key, ids.Count);
                next[i] = ids[key];
            }

            if (ids.Count == now.Distinct().Count())
            {
                return next;
            }

            now = next;
        }
    }
}
