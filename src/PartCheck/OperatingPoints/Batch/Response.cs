using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using static PartCheck.OperatingPoints.Batch.ElementaryFunctions;
using Lanes = System.Runtime.Intrinsics.Vector512<double>;

namespace PartCheck.OperatingPoints.Batch;

/// <summary>
/// How a quantity of one transistor answers in a Newton step, once its own unknowns are eliminated: a constant, and slopes with
/// the base node, the control's base and the joined collectors.
/// </summary>
internal struct Response
{
    public Lanes Constant;
    public Lanes Vb;
    public Lanes Vx;
    public Lanes Vc;

    /// <summary>a times one response plus b times another.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Response Of(Lanes a, in Response first, Lanes b, in Response second) => new()
    {
        Constant = Sum(a, first.Constant, b, second.Constant),
        Vb = Sum(a, first.Vb, b, second.Vb),
        Vx = Sum(a, first.Vx, b, second.Vx),
        Vc = Sum(a, first.Vc, b, second.Vc),
    };

    /// <summary>Adds a times another response.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Add(Lanes a, in Response other)
    {
        Constant = Vector512.FusedMultiplyAdd(a, other.Constant, Constant);
        Vb = Vector512.FusedMultiplyAdd(a, other.Vb, Vb);
        Vx = Vector512.FusedMultiplyAdd(a, other.Vx, Vx);
        Vc = Vector512.FusedMultiplyAdd(a, other.Vc, Vc);
    }

    /// <summary>The answer to a step of the three node voltages.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public readonly Lanes At(Lanes vb, Lanes vx, Lanes vc) => Vector512.FusedMultiplyAdd(Vb, vb, Vector512.FusedMultiplyAdd(Vx, vx, Vector512.FusedMultiplyAdd(Vc, vc, Constant)));
}

/// <summary>The inverse of three by three, by cofactors.</summary>
internal struct Inverse3
{
    public Lanes M00;
    public Lanes M01;
    public Lanes M02;
    public Lanes M10;
    public Lanes M11;
    public Lanes M12;
    public Lanes M20;
    public Lanes M21;
    public Lanes M22;

    public static Inverse3 Of(Lanes a, Lanes b, Lanes c, Lanes d, Lanes e, Lanes f, Lanes g, Lanes h, Lanes i)
    {
        Lanes first = Difference(e, i, f, h);
        Lanes second = Difference(f, g, d, i);
        Lanes third = Difference(d, h, e, g);
        Lanes inverse = Lanes.One / Vector512.FusedMultiplyAdd(a, first, Sum(b, second, c, third));
        return new()
        {
            M00 = first * inverse,
            M01 = Difference(c, h, b, i) * inverse,
            M02 = Difference(b, f, c, e) * inverse,
            M10 = second * inverse,
            M11 = Difference(a, i, c, g) * inverse,
            M12 = Difference(c, d, a, f) * inverse,
            M20 = third * inverse,
            M21 = Difference(b, g, a, h) * inverse,
            M22 = Difference(a, e, b, d) * inverse,
        };
    }

    /// <summary>First row times a column.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public readonly Lanes First(Lanes x, Lanes y, Lanes z) => Vector512.FusedMultiplyAdd(M00, x, Sum(M01, y, M02, z));

    /// <summary>Second row times a column.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public readonly Lanes Second(Lanes x, Lanes y, Lanes z) => Vector512.FusedMultiplyAdd(M10, x, Sum(M11, y, M12, z));

    /// <summary>Third row times a column.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public readonly Lanes Third(Lanes x, Lanes y, Lanes z) => Vector512.FusedMultiplyAdd(M20, x, Sum(M21, y, M22, z));
}
