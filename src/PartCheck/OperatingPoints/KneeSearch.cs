namespace PartCheck.OperatingPoints;

/// <summary>
/// Knees: from a worst corner into the box, dimension by dimension, to where a measure peaks inside its ranges.
/// <para>Why it is needed: P = (V - I R) I of a pass transistor peaks at I = V/(2 R) where the load is resistive; the pair (VCE, IC)
/// likewise; a thermal loop gain where VCE falls as VT/IC does; a starved channel's current at the ambient where gain no longer falls faster than
/// VBE. Nothing else in the circuit turns round: every current and voltage rises or falls with each range alone.</para>
/// <para>How: each dimension is tried a thousandth and half of the way to its other end. Where either is worse than the corner, the peak is
/// bracketed and closed in by golden section to 1e-6 of the range; then the next dimension, and after a round the direction in which the
/// round moved, until a round gains nothing. A peak that has one maximum along each dimension is found exactly. That none is missed in
/// practice is held by test: points inside thousands of random boxes, none worse than corners and knees.</para>
/// </summary>
public sealed class KneeSearch
{
    private const double Inch = 1e-3;
    private const double Gain = 1e-9;
    private const int Rounds = 12;
    private const int Sections = 30;
    private static readonly double Golden = (Math.Sqrt(5) - 1) / 2;
    private readonly ChannelModel model;
    private readonly PinSource pin;
    private readonly IReadOnlyList<ChannelBox> boxes;

    /// <summary>Makes a search over the boxes that <see cref="WorstCase.Boxes"/> enumerates.</summary>
    /// <param name="model">The channel.</param>
    /// <param name="pin">Its pin.</param>
    public KneeSearch(ChannelModel model, PinSource pin)
    {
        this.model = model;
        this.pin = pin;
        boxes = WorstCase.Boxes(model, pin);
    }

    /// <summary>Climbs from a corner.</summary>
    /// <param name="corner">A solved corner of the enumeration.</param>
    /// <param name="driveFactor">k' of the edge of regulation, where the measure reads it; null: it is not solved.</param>
    /// <param name="measure">What to raise; NaN: not to be judged there.</param>
    /// <returns>The state at the peak; null where no point is worse than the corner.</returns>
    public SolvedState? Climb(SolvedState corner, double? driveFactor, Func<SolvedState, double> measure)
    {
        ArgumentNullException.ThrowIfNull(corner);
        ArgumentNullException.ThrowIfNull(measure);
        double start = measure(corner);
        if (corner.Index < 0 || !double.IsFinite(start))
        {
            return null;
        }

        int index = corner.Index;
        int b = 0;
        while (index >= boxes[b].Count)
        {
            index -= boxes[b++].Count;
        }

        Climber climber = new(new BoxInterior(model, pin, boxes[b]), new CornerSolver(model, pin, driveFactor), boxes[b], index, corner.Index, measure);
        return climber.Climb(corner, start);
    }

    private sealed class Climber(BoxInterior interior, CornerSolver solver, ChannelBox box, int index, int shown, Func<SolvedState, double> measure)
    {
        private double[] at = [];
        private double best;
        private SolvedState? peak;

        public SolvedState? Climb(SolvedState corner, double start)
        {
            at = interior.PositionOf(corner.Corner);
            best = start;
            for (int round = 0; round < Rounds; round++)
            {
                double before = best;
                double[] from = [.. at];
                foreach (BoxDimension dimension in interior.Dimensions)
                {
                    double[] direction = new double[BoxInterior.DimensionCount];
                    direction[(int)dimension] = 1;
                    Along(direction);
                    direction[(int)dimension] = -1;
                    Along(direction);
                }

                if (!(best > before + (Gain * Math.Abs(before))))
                {
                    break;
                }

                Along([.. at.Zip(from, (now, then) => now - then)]);
            }

            return peak;
        }

        /// <summary>The best point on the way from here to the side of the box, if it is better than here.</summary>
        private void Along(double[] direction)
        {
            double span = double.PositiveInfinity;
            for (int d = 0; d < direction.Length; d++)
            {
                span = direction[d] > 0 ? Math.Min(span, (1 - at[d]) / direction[d]) : direction[d] < 0 ? Math.Min(span, at[d] / -direction[d]) : span;
            }

            if (!double.IsFinite(span) || span <= 0)
            {
                return;
            }

            double[] here = at;
            double floor = best;
            double Try(double share)
            {
                double[] position = [.. here.Zip(direction, (p, d) => Math.Clamp(p + (share * span * d), 0, 1))];
                SolvedState state = solver.SolveInside(box, interior.At(index, position), shown);
                double value = state.Solved ? measure(state) : double.NaN;
                if (value > best)
                {
                    (best, at, peak) = (value, position, state);
                }

                return double.IsNaN(value) ? double.NegativeInfinity : value;
            }

            double inch = Try(Inch);
            double half = Try(0.5);
            if (inch <= floor && half <= floor)
            {
                return;
            }

            Try(1);
            double low = inch > half ? 0 : Inch;
            double high = inch > half ? 0.5 : 1;
            double left = high - (Golden * (high - low));
            double right = low + (Golden * (high - low));
            double atLeft = Try(left);
            double atRight = Try(right);
            for (int i = 0; i < Sections; i++)
            {
                if (atLeft >= atRight)
                {
                    (high, right, atRight) = (right, left, atLeft);
                    left = high - (Golden * (high - low));
                    atLeft = Try(left);
                }
                else
                {
                    (low, left, atLeft) = (left, right, atRight);
                    right = low + (Golden * (high - low));
                    atRight = Try(right);
                }
            }
        }
    }
}
