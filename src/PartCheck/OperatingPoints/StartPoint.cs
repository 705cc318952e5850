namespace PartCheck.OperatingPoints;

/// <summary>The unknowns of a solution, kept to start the next solve of a circuit of the same shape from.</summary>
public sealed class StartPoint
{
    private readonly double[] unknowns = new double[36];
    private int count;
    private bool fed;

    /// <summary>True where it holds a solution.</summary>
    public bool HasSolution => count > 0;

    /// <summary>Forgets the solution.</summary>
    public void Clear() => count = 0;

    internal void Take(double[] x, int used, SinkCircuit circuit)
    {
        x.CopyTo(unknowns, 0);
        count = used;
        fed = circuit.Load is not null;
    }

    /// <summary>Hands the unknowns out where the shape is the same.</summary>
    internal bool Give(double[] x, int used, SinkCircuit circuit)
    {
        if (count != used || fed != circuit.Load is not null)
        {
            return false;
        }

        unknowns.CopyTo(x, 0);
        return true;
    }
}
