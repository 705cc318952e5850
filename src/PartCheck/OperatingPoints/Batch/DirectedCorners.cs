using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// Finds the corners where something is worst without solving all of them. For each heat and ambient (all of them are visited, with every
/// knee) two opposite corners and all their neighbours, which differ in one dimension, are solved: the signs of the sensitivities. Each score's
/// signs direct it to its own corner, and there they are confirmed: a corner counts as a score's worst only when every neighbour of it is
/// solved and none is worse; else the search goes on from that neighbour. (To confirm only the signs that differ between the two
/// corners is not enough: it missed one channel in a hundred, by up to 6 %.) That this is what full enumeration gives is shown by
/// comparison on random channels.
/// </summary>
public sealed class DirectedCorners
{
    private readonly CornerBatch batch;
    private readonly Func<SolvedState, double[]> visit;
    private readonly Dictionary<int, double[]> known = [];
    private readonly List<int> wanted = [];
    private readonly List<SolvedState> states = [];
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
        int scores = known[low].Length;
        for (int s = 0; s < scores; s++)
        {
            if (most[s] > double.NegativeInfinity)
            {
                Want(Directed(s, low, high, first, dimensions));
            }
        }

        Solve(box, offset);
        do
        {
            for (int s = 0; s < scores; s++)
            {
                // A score that says nothing anywhere has no worst corner.
                if (most[s] > double.NegativeInfinity)
                {
                    WantNeighbours(worst[s], first, dimensions);
                }
            }
        }
        while (Solve(box, offset));
    }

    /// <summary>The corner to which a score's signs point; where the two opposite corners disagree, the larger change decides.</summary>
    private int Directed(int score, int low, int high, int first, List<(int Stride, int Length)> dimensions)
    {
        int corner = first;
        foreach ((int stride, int length) in dimensions)
        {
            int top = stride * (length - 1);
            double up = Change(known[low + top][score], known[low][score]);
            double down = Change(known[high][score], known[high - top][score]);
            corner += up + down > 0 ? top : 0;
        }

        return corner;
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

    /// <summary>Solves what is wanted; false where nothing was.</summary>
    private bool Solve(ChannelBox box, int offset)
    {
        if (wanted.Count == 0)
        {
            return false;
        }

        wanted.Sort();
        states.Clear();
        batch.Solve(box, System.Runtime.InteropServices.CollectionsMarshal.AsSpan(wanted), offset, states.Add);
        for (int i = 0; i < wanted.Count; i++)
        {
            Keep(wanted[i], visit(states[i]));
        }

        wanted.Clear();
        return true;
    }
}
