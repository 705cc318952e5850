namespace PartCheck.OperatingPoints;

/// <summary>
/// The scalar reference solver of one channel: Newton on <see cref="SinkEquations"/> with the junction-voltage steps
/// limited, and a ladder below it: (1) Newton from the last solution, (2) Newton from a cold start, (3) the thermal resistances
/// raised from zero, (4) the pin's source raised from zero, each in steps that shrink where they fail, (5) <see cref="NotSolved"/>. Converged means that the steps have
/// died out and that the currents balance. Not thread-safe: one solver a thread.
/// </summary>
public sealed class SinkSolver
{
    /// <summary>Internal base-collector voltage from which an edge of regulation may not be the lowest [V].</summary>
    internal const double SaturatedFrom = 0.25;

    private const int StepLimit = 80;
    private const double VoltageTolerance = 1e-10;
    private const double TemperatureTolerance = 1e-6;
    private const double BalanceTolerance = 1e-9;
    private const double RoundingBalance = 1e-12;
    private const double RoundingSteps = 1000;

    private readonly SinkEquations equations = new();
    private readonly double[] x = new double[36];
    private readonly double[] trial = new double[36];
    private readonly double[] step = new double[36];
    private readonly double[] held = new double[9];
    private int iterations;
    private double lastResidual;

    /// <summary>The point where the last solve failed; null: it did not.</summary>
    public NotSolved? Failure { get; private set; }

    /// <summary>Solves a circuit.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="start">A solution nearby to start from; null: a cold start. Overwritten by this solution's unknowns.</param>
    /// <returns>The operating point; null where the ladder gave up (see <see cref="Failure"/>).</returns>
    public OperatingPoint? Solve(SinkCircuit circuit, StartPoint? start = null) =>
        Run(circuit, start);

    /// <summary>
    /// Solves the edge of regulation: the lowest base voltage at which the control collects (factor - 1) times the sum of the
    /// pass transistors' base currents, whatever feeds the base node. Down at the leakage currents the same equation holds
    /// once more near 0 V; that is no regulation, so a solution counts only where the control's junction conducts.
    /// </summary>
    /// <param name="circuit">The circuit; its pin, feed and pull-down are not read. No junction may heat itself.</param>
    /// <param name="factor">k', above 1.</param>
    /// <param name="start">An edge nearby to start from; overwritten by this one.</param>
    /// <returns>The edge; null where there is none up to 3.6 V at the base node, or where the solver gave up (<see cref="Failure"/>).</returns>
    public OperatingPoint? SolveEdge(SinkCircuit circuit, double factor, StartPoint? start = null)
    {
        ArgumentNullException.ThrowIfNull(circuit);
        ArgumentOutOfRangeException.ThrowIfLessThanOrEqual(factor, 1);
        Failure = null;
        iterations = 0;
        Array.Fill(held, double.NaN);
        held.CopyTo(equations.HeldAt, 0);
        equations.SourceShare = 1;
        equations.Lay(circuit, BaseNodeCondition.Edge, factor, heated: false);
        if (start is not null && start.Give(x, equations.Count, circuit) && Newton() && Regulates() && !Saturates(circuit))
        {
            start.Take(x, equations.Count, circuit);
            return Point(circuit);
        }

        start?.Clear();
        ColdStart(circuit);
        bool found = false;
        bool failed = false;
        for (int step = 0; step <= 170 && !found; step++)
        {
            // Fine enough not to step over two roots, one where the control takes over and one where a pass transistor saturates.
            double volts = 0.2 + (0.02 * step);
            equations.Lay(circuit, BaseNodeCondition.Driven, factor, heated: false);
            equations.DrivenVoltage = volts;
            if (!Newton())
            {
                failed = true;
                ColdStart(circuit);
                continue;
            }


            equations.Evaluate(x);
            if (equations.Currents(0).Ic < (factor - 1) * equations.SumBaseCurrent || !Regulates())
            {
                continue;
            }

            // From above: the control collects more than asked.
            equations.Lay(circuit, BaseNodeCondition.Edge, factor, heated: false);
            double[] above = [.. x];
            found = Newton() && Regulates();
            if (!found)
            {
                failed = true;
                above.CopyTo(x, 0);
            }
        }

        if (!found)
        {
            Failure = failed ? new NotSolved(lastResidual, iterations) : null;
            return null;
        }

        start?.Take(x, equations.Count, circuit);
        return Point(circuit);
    }

    /// <summary>True where the control's junction conducts well above its leakage.</summary>
    private bool Regulates() => x[0] > 3 * equations.Device(0).ForwardVoltage;

    /// <summary>
    /// True where a pass transistor's collector junction is forward biased by more than <see cref="SaturatedFrom"/>. Below that, the edge
    /// is one root; near drop-out a base current that rises in saturation can make three, of which the lowest counts.
    /// </summary>
    private bool Saturates(SinkCircuit circuit)
    {
        for (int g = 1; g <= circuit.Legs.Count; g++)
        {
            if (x[(2 * g) + 1] > SaturatedFrom)
            {
                return true;
            }
        }

        return false;
    }

    private OperatingPoint? Run(SinkCircuit circuit, StartPoint? start)
    {
        ArgumentNullException.ThrowIfNull(circuit);
        Failure = null;
        iterations = 0;
        equations.SourceShare = 1;
        equations.HeatShare = 1;
        Array.Fill(held, double.NaN);
        bool solved = Attempt(circuit, start);

        // A junction beyond its bound is held there, one after the other, hottest first.
        for (int round = 0; round <= circuit.Legs.Count; round++)
        {
            int runaway = solved ? HottestBeyondLimit(circuit) : NextToHold(circuit);
            if (runaway < 0)
            {
                break;
            }

            held[runaway] = equations.Heat(runaway).Limit;
            solved = Attempt(circuit, null);
        }

        if (!solved || !HeldJunctionsRanAway(circuit))
        {
            Failure = new NotSolved(lastResidual, iterations);
            start?.Clear();
            return null;
        }

        start?.Take(x, equations.Count, circuit);
        return Point(circuit);
    }

    private bool Attempt(SinkCircuit circuit, StartPoint? start)
    {
        held.CopyTo(equations.HeldAt, 0);
        equations.Lay(circuit, BaseNodeCondition.Fed, 0, heated: true);
        if (start is not null && start.Give(x, equations.Count, circuit) && Newton())
        {
            return true;
        }

        ColdStart(circuit);
        return Newton() || RaiseHeat(circuit) || RaiseSource(circuit);
    }

    /// <summary>Third rung: every junction at ambient first, then the thermal resistances from zero.</summary>
    private bool RaiseHeat(SinkCircuit circuit)
    {
        if (equations.Count == equations.LoadIndex + 1)
        {
            return false;
        }

        equations.HeatShare = 0;
        ColdStart(circuit);
        bool solved = (Newton() || RaiseSource(circuit)) && Raise(share => equations.HeatShare = share);
        equations.HeatShare = 1;
        return solved;
    }

    /// <summary>Fourth rung: the pin's source from zero.</summary>
    private bool RaiseSource(SinkCircuit circuit)
    {
        ColdStart(circuit);
        Array.Clear(x, 0, equations.LoadIndex);
        bool solved = Raise(share => equations.SourceShare = share);
        equations.SourceShare = 1;
        return solved;
    }

    /// <summary>Moves a share from 0 to 1 in steps that shrink where they fail, each from the solution below it.</summary>
    private bool Raise(Action<double> set)
    {
        double done = 0;
        double stride = 0.1;
        double[] kept = [.. x];
        while (done < 1)
        {
            double next = Math.Min(1, done + stride);
            set(next);
            if (Newton())
            {
                done = next;
                x.CopyTo(kept, 0);
                stride = Math.Min(0.2, stride * 2);
            }
            else
            {
                kept.CopyTo(x, 0);
                stride /= 4;
                if (stride < 1e-4)
                {
                    return false;
                }
            }
        }

        return true;
    }

    private bool Newton()
    {
        int n = equations.Count;
        double largest = double.PositiveInfinity;
        for (int k = 0; k < StepLimit; k++)
        {
            iterations++;
            equations.Evaluate(x);
            for (int i = 0; i < n; i++)
            {
                step[i] = -equations.Residual[i];
            }

            double worst = WorstResidual();
            lastResidual = worst;
            if (!double.IsFinite(worst) || !LinearSolver.Solve(equations.Jacobian, step, n))
            {
                return false;
            }

            largest = 0;
            for (int i = 0; i < n; i++)
            {
                double limited = Limit(i, x[i], step[i]);
                double tolerance = i > equations.LoadIndex
                    ? TemperatureTolerance
                    : VoltageTolerance * (1 + Math.Abs(x[i]));
                if (!double.IsFinite(limited))
                {
                    return false;
                }

                largest = Math.Max(largest, Math.Abs(limited) / tolerance);
                trial[i] = x[i] + limited;
            }

            Array.Copy(trial, x, n);
            if (largest <= 1 && worst <= BalanceTolerance)
            {
                return true;
            }
        }

        // Deep in drop-out an unknown may be set by so small a current that rounding moves it for ever: by 0.1 uV at most, while the
        // currents balance to the last digits.
        return largest <= RoundingSteps && lastResidual <= RoundingBalance;
    }

    private double WorstResidual()
    {
        double worst = 0;
        for (int i = 0; i < equations.Count; i++)
        {
            double magnitude = Math.Abs(equations.Residual[i]);

            // Below 10 fA (or 10 fV) rounding of the voltages decides: it balances by any standard of this work.
            double relative = magnitude < 1e-14 ? 0 : magnitude / (equations.Scale[i] + 1e-300);
            worst = double.IsNaN(relative) ? double.NaN : Math.Max(worst, relative);
        }

        return worst;
    }

    /// <summary>The one place where steps are limited: junctions by the logarithm of SPICE (pnjlim), temperatures by 40 K.</summary>
    private double Limit(int index, double old, double step)
    {
        if (index > equations.LoadIndex)
        {
            double bounded = Math.Clamp(step, -40, 40);
            return Math.Clamp(old + bounded, 100, 900) - old;
        }

        if (index == equations.LoadIndex)
        {
            LoadElement? load = equations.Circuit.Load;
            return load is null || load.IsResistor ? step : Junction(old, step, load.EmissionVoltage, load.CriticalVoltage);
        }

        ref readonly Devices.BipolarAtTemperature device = ref equations.Device(index / 2);
        double scale = index % 2 == 0 ? device.ForwardVoltage : device.ReverseVoltage;
        double critical = scale * Math.Log(scale / (Math.Sqrt(2) * device.SaturationCurrent));
        return Junction(old, step, scale, critical);
    }

    private static double Junction(double old, double step, double scale, double critical)
    {
        double next = old + step;
        if (next <= critical || Math.Abs(step) <= 2 * scale)
        {
            return step;
        }

        if (old <= 0)
        {
            return (scale * Math.Log(Math.Max(next / scale, 1.01))) - old;
        }

        double argument = 1 + (step / scale);
        return argument > 0 ? scale * Math.Log(argument) : Math.Max(critical, old - (10 * scale)) - old;
    }

    private void ColdStart(SinkCircuit circuit)
    {
        double pin = circuit.FeedVoltage;
        double forward = pin > 1 ? 0.6 : 0.4 * pin;
        double baseNode = Math.Min(2 * forward, Math.Max(pin, 0));
        double drop = circuit.Load is null ? 0 : Math.Min(circuit.Load.FirstGuess, circuit.Supply);
        double collector = circuit.Load is null ? Math.Max(baseNode - forward, 0) : circuit.Supply - drop;
        x[0] = forward;
        x[1] = forward - baseNode;
        for (int g = 1; g <= circuit.Legs.Count; g++)
        {
            x[2 * g] = forward;
            x[(2 * g) + 1] = baseNode - collector;
        }

        x[equations.LoadIndex] = circuit.Load is null ? collector : drop;
        for (int d = 0; d <= circuit.Legs.Count; d++)
        {
            if (equations.TemperatureIndex[d] >= 0)
            {
                x[equations.TemperatureIndex[d]] = equations.Heat(d).Base;
            }
        }
    }

    private int HottestBeyondLimit(SinkCircuit circuit)
    {
        int found = -1;
        double most = 0;
        for (int d = 0; d <= circuit.Legs.Count; d++)
        {
            double excess = equations.Temperature(d, x) - equations.Heat(d).Limit;
            if (double.IsNaN(held[d]) && excess > most)
            {
                most = excess;
                found = d;
            }
        }

        return found;
    }

    /// <summary>
    /// Where no solution was found with free junctions, thermal runaway may be why: the junction that is hottest at the
    /// last point is held next; -1 when none heats itself any more.
    /// </summary>
    private int NextToHold(SinkCircuit circuit)
    {
        int found = -1;
        double most = 0;
        for (int d = 0; d <= circuit.Legs.Count; d++)
        {
            double rise = equations.Temperature(d, x) - equations.Heat(d).Base;
            if (double.IsNaN(held[d]) && equations.TemperatureIndex[d] >= 0 && rise >= most)
            {
                most = rise;
                found = d;
            }
        }

        return found;
    }

    /// <summary>A held junction must want to be at least as hot as it is held: else it did not run away, the solve failed.</summary>
    private bool HeldJunctionsRanAway(SinkCircuit circuit)
    {
        for (int d = 0; d <= circuit.Legs.Count; d++)
        {
            JunctionHeat heat = equations.Heat(d);
            double coupled = 0;
            for (int g = 1; d == 0 && g <= circuit.Legs.Count; g++)
            {
                LegGroup leg = circuit.Legs[g - 1];
                coupled += ((leg.Count * leg.Coupling) + (circuit.HottestLegCoupling * leg.Heat.RthJa)) * equations.Power(g);
            }

            for (int k = 0; k < circuit.Package.Count; k++)
            {
                coupled += circuit.Package[k].Heated == d ? circuit.Package[k].Rth * equations.Power(circuit.Package[k].By) : 0;
            }

            if (!double.IsNaN(held[d]) && heat.Base + (heat.RthJa * equations.Power(d)) + coupled < held[d] - 0.5)
            {
                return false;
            }
        }

        return true;
    }

    private OperatingPoint Point(SinkCircuit circuit)
    {
        SolvedTransistor[] legs = new SolvedTransistor[circuit.Legs.Count];
        double[] averaging = new double[circuit.Legs.Count];
        for (int g = 1; g <= legs.Length; g++)
        {
            ref readonly Devices.BipolarCurrents q = ref equations.Currents(g);
            legs[g - 1] = new SolvedTransistor(
                q.Ic, q.Ib, equations.BaseVoltage, equations.CollectorVoltage, equations.EmitterVoltage(g),
                equations.Temperature(g, x), !double.IsNaN(held[g]))
            {
                VbeSlope = q.DIc.Vbe > 0 ? -q.DIc.T / q.DIc.Vbe : 0,
                BaseResistance = q.Rbb,
            };
            averaging[g - 1] = equations.AveragingCurrent(g);
        }

        ref readonly Devices.BipolarCurrents q0 = ref equations.Currents(0);
        double feedCurrent = (circuit.FeedVoltage - equations.BaseVoltage) / circuit.FeedResistance;
        double pinNode = equations.BaseVoltage + (feedCurrent * circuit.Feed);
        bool atPin = circuit.PullDownAt == Channels.PullDownAt.Pin;
        return new OperatingPoint
        {
            BaseVoltage = equations.BaseVoltage,
            ControlBaseVoltage = equations.ControlBaseVoltage,
            CollectorVoltage = equations.CollectorVoltage,
            LoadCurrent = equations.LoadCurrent,
            FeedCurrent = feedCurrent,
            PinCurrent = feedCurrent + (atPin ? pinNode / circuit.PullDown : 0),
            Control = new SolvedTransistor(
                q0.Ic, q0.Ib, equations.ControlBaseVoltage, equations.BaseVoltage, 0, equations.Temperature(0, x), !double.IsNaN(held[0]))
            {
                BaseResistance = q0.Rbb,
            },
            Legs = legs,
            AveragingCurrents = averaging,
            Iterations = iterations,
        };
    }
}
