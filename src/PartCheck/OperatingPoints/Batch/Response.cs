using System.Runtime.CompilerServices;
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
        Constant = (a * first.Constant) + (b * second.Constant),
        Vb = (a * first.Vb) + (b * second.Vb),
        Vx = (a * first.Vx) + (b * second.Vx),
        Vc = (a * first.Vc) + (b * second.Vc),
    };

    /// <summary>Adds a times another response.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Add(Lanes a, in Response other)
    {
        Constant += a * other.Constant;
        Vb += a * other.Vb;
        Vx += a * other.Vx;
        Vc += a * other.Vc;
    }

    /// <summary>The answer to a step of the three node voltages.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public readonly Lanes At(Lanes vb, Lanes vx, Lanes vc) => Constant + (Vb * vb) + (Vx * vx) + (Vc * vc);
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
        Lanes first = (e * i) - (f * h);
        Lanes second = (f * g) - (d * i);
        Lanes third = (d * h) - (e * g);
        Lanes inverse = Lanes.One / ((a * first) + (b * second) + (c * third));
        return new()
        {
            M00 = first * inverse,
            M01 = ((c * h) - (b * i)) * inverse,
            M02 = ((b * f) - (c * e)) * inverse,
            M10 = second * inverse,
            M11 = ((a * i) - (c * g)) * inverse,
            M12 = ((c * d) - (a * f)) * inverse,
            M20 = third * inverse,
            M21 = ((b * g) - (a * h)) * inverse,
            M22 = ((a * e) - (b * d)) * inverse,
        };
    }
}
