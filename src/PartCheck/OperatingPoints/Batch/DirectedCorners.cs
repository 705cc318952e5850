using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// Finds the corners where something is worst without solving all of them. For each heat and ambient (all of them are visited, with every
/// knee) two opposite corners and all their neighbours, which differ in one dimension, are solved: the signs of the sensitivities. The signs
/// at either end, and both together, direct each score to its corners (a dissipation that peaks inside the box has one on either side of
/// the peak). From there, and from the worst corner met on the way, each climbs to the worst neighbour until no neighbour is worse: a
/// sign that differs from corner to corner costs time, not truth. That this is what full enumeration gives is shown by comparison on random
/// channels.
/// </summary>
public sealed class DirectedCorners
{
    private readonly CornerBatch batch;
    private readonly Func<SolvedState, double[]> visit;
    private readonly Dictionary<int, double[]> known = [];
    private readonly List<int> wanted = [];
    private readonly List<SolvedState> states = [];
    private readonly List<(int Score, int Corner)> climbers = [];
    private int[] worst = [];
    private double[] most = [];

    /// <summary>Makes a search.</summary>
    /// <param name="batch">Solves corners.</param>
    /// <param name="visit">Takes a state; returns its scores, always the same number in the same order: the higher the worse, negative
    /// infinity where a state says nothing.</param>
    public DirectedCorners(CornerBatch batch, Func<SolvedState, double[]> visit)
    {
        ArgumentNullException.ThrowIfNull(batch);
        ArgumentNullException.ThrowIfNull(visit);
        this.batch = batch;
        this.visit = visit;
    }

    /// <summary>Searches one box.</summary>
    /// <param name="box">The box.</param>
    /// <param name="offset">Added to the index in the states.</param>
    /// <param name="cancel">Stops the search.</param>
    public void Search(ChannelBox box, int offset, CancellationToken cancel)
    {
        ArgumentNullException.ThrowIfNull(box);
        int cube = box.Directed.Aggregate(1, (product, length) => product * length);
        List<(int Stride, int Length)> dimensions = [];
        int stride = 1;
        foreach (int length in box.Directed)
        {
            if (length > 1)
            {
                dimensions.Add((stride, length));
            }

            stride *= length;
        }

        batch.Forget();
        for (int first = 0; first < box.Count; first += cube)
        {
            cancel.ThrowIfCancellationRequested();
            Search(box, first, cube, dimensions, offset);
        }
    }

    private void Search(ChannelBox box, int first, int cube, List<(int Stride, int Length)> dimensions, int offset)
    {
        known.Clear();
        int low = first;
        int high = first + cube - 1;
        Want(low);
        Want(high);
        WantNeighbours(low, first, dimensions);
        WantNeighbours(high, first, dimensions);
        Solve(box, offset);
        climbers.Clear();
        for (int s = 0; s < most.Length; s++)
        {
            if (most[s] > double.NegativeInfinity)
            {
                climbers.Add((s, Directed(s, low, high, first, dimensions, 1, 1)));
                climbers.Add((s, Directed(s, low, high, first, dimensions, 1, 0)));
                climbers.Add((s, Directed(s, low, high, first, dimensions, 0, 1)));
            }
        }

        foreach ((_, int corner) in climbers)
        {
            Want(corner);
        }

        Solve(box, offset);
        for (int s = 0; s < most.Length; s++)
        {
            if (most[s] > double.NegativeInfinity)
            {
                climbers.Add((s, worst[s]));
            }
        }

        bool moved = true;
        while (moved)
        {
            foreach ((_, int corner) in climbers)
            {
                WantNeighbours(corner, first, dimensions);
            }

            Solve(box, offset);
            moved = false;
            for (int i = 0; i < climbers.Count; i++)
            {
                (int score, int corner) = climbers[i];
                int next = WorstNeighbour(score, corner, first, dimensions);
                moved |= next != corner;
                climbers[i] = (score, next);
            }
        }
    }

    /// <summary>The corner to which a score's signs point, those of the two opposite corners weighted.</summary>
    private int Directed(int score, int low, int high, int first, List<(int Stride, int Length)> dimensions, double atLow, double atHigh)
    {
        int corner = first;
        foreach ((int stride, int length) in dimensions)
        {
            int top = stride * (length - 1);
            double up = Change(known[low + top][score], known[low][score]);
            double down = Change(known[high][score], known[high - top][score]);
            corner += (atLow * up) + (atHigh * down) > 0 ? top : 0;
        }

        return corner;
    }

    private int WorstNeighbour(int score, int corner, int first, List<(int Stride, int Length)> dimensions)
    {
        int best = corner;
        foreach ((int stride, int length) in dimensions)
        {
            int digit = (corner - first) / stride % length;
            for (int other = 0; other < length; other++)
            {
                int neighbour = corner + ((other - digit) * stride);
                best = known[neighbour][score] > known[best][score] ? neighbour : best;
            }
        }

        return best;
    }

    private static double Change(double to, double from) =>
        double.IsFinite(to - from) ? to - from : to > from ? 1e300 : to < from ? -1e300 : 0;

    /// <summary>Keeps a corner's scores and where each is worst; of corners alike the lowest index.</summary>
    private void Keep(int index, double[] scores)
    {
        if (known.Count == 0)
        {
            worst = new int[scores.Length];
            most = new double[scores.Length];
            Array.Fill(most, double.NegativeInfinity);
        }

        known[index] = scores;
        for (int s = 0; s < scores.Length; s++)
        {
            if (scores[s] > most[s] || (scores[s] == most[s] && index < worst[s]))
            {
                worst[s] = index;
                most[s] = scores[s];
            }
        }
    }

    private void Want(int index)
    {
        if (!known.ContainsKey(index) && !wanted.Contains(index))
        {
            wanted.Add(index);
        }
    }

    private void WantNeighbours(int corner, int first, List<(int Stride, int Length)> dimensions)
    {
        foreach ((int stride, int length) in dimensions)
        {
            int digit = (corner - first) / stride % length;
            for (int other = 0; other < length; other++)
            {
                Want(corner + ((other - digit) * stride));
            }
        }
    }

    private void Solve(ChannelBox box, int offset)
    {
        wanted.Sort();
        states.Clear();
        batch.Solve(box, System.Runtime.InteropServices.CollectionsMarshal.AsSpan(wanted), offset, states.Add);
        for (int i = 0; i < wanted.Count; i++)
        {
            Keep(wanted[i], visit(states[i]));
        }

        wanted.Clear();
    }
}
