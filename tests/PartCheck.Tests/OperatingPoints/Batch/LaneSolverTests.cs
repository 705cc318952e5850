using System.Globalization;
using CsCheck;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.OperatingPoints.Batch;
using PartCheck.Tests.Reference;
using Xunit;

namespace PartCheck.Tests.OperatingPoints.Batch;

/// <summary>Eight circuits side by side against the scalar solver, the recorded ngspice table and the scalar equations.</summary>
public class LaneSolverTests
{
    private const int Width = 8;

    /// <summary>The recorded table, 0.1 % or 1 nA, straight from the lanes.</summary>
    [Fact]
    public void EveryRecordedCircuitAgrees()
    {
        int solved = 0;
        int all = 0;
        foreach (var group in ReferenceTable.Read().Select(r => (Circuit: r.Circuit.ToSink(), r.Result)).GroupBy(r => CircuitShape.Of(r.Circuit)))
        {
            foreach ((SinkCircuit Circuit, ReferenceResult Result)[] block in group.Chunk(Width))
            {
                LaneSolution solution = Solve([.. block.Select(b => b.Circuit)]);
                for (int i = 0; i < block.Length; i++)
                {
                    all++;
                    if (!solution.IsSolved(i))
                    {
                        continue;
                    }

                    solved++;
                    OperatingPoint p = solution.Point(block[i].Circuit, i);
                    ReferenceResult r = block[i].Result;
                    Near(r.LoadCurrent, p.LoadCurrent, 1e-3, 1e-9);
                    Near(r.PinCurrent, p.PinCurrent, 1e-3, 1e-9);
                    Near(r.BaseVoltage, p.BaseVoltage, 1e-3, 10e-6);
                    Near(r.ControlIc, p.Control.Ic, 1e-3, 1e-9);
                    for (int g = 0; g < r.Ic.Count; g++)
                    {
                        Near(r.Ic[g], p.Legs[g].Ic, 1e-3, 1e-9);
                        Near(r.Ib[g], p.Legs[g].Ib, 1e-3, 1e-9);
                    }
                }
            }
        }

        Assert.InRange(all, 300, 10_000);
        Assert.InRange(solved, all * 0.99, all);
    }

    /// <summary>
    /// A million random states. All of them are put into the scalar device equations and Kirchhoff's laws, which costs one evaluation
    /// instead of a solve; one in twenty is solved by the scalar solver as well, which bounds the time.
    /// </summary>
    [Fact]
    public void AMillionStatesBalanceInTheScalarEquations()
    {
        long states = 0;
        long left = 0;
        Gen.ULong.Sample(
            seed =>
            {
                SinkCircuit[] circuits = new RandomStates(seed).Circuits(8_000, heated: false);
                Interlocked.Add(ref left, Check(circuits, 20));
                Interlocked.Add(ref states, circuits.Length);
            },
            iter: 125);
        Assert.Equal(1_000_000, states);
        TestContext.Current.TestOutputHelper?.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{left} of {states} left to the scalar solver"));
        Assert.InRange(left, 0, states / 200);
    }

    [Fact]
    public void SelfHeatedStatesAgree()
    {
        long states = 0;
        long left = 0;
        Gen.ULong.Sample(
            seed =>
            {
                SinkCircuit[] circuits = new RandomStates(seed).Circuits(1_000, heated: true);
                Interlocked.Add(ref left, Check(circuits, 10));
                Interlocked.Add(ref states, circuits.Length);
            },
            iter: 100);
        TestContext.Current.TestOutputHelper?.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{left} of {states} left to the scalar solver"));
        Assert.InRange(left, 0, states / 20);
    }

    // A lane says nothing of its neighbours: a circuit alone in all lanes gives what it gives among others.
    [Fact]
    public void ALaneDoesNotKnowItsNeighbours()
    {
        SinkCircuit[] circuits = new RandomStates(7).Circuits(Width, heated: false);
        LaneSolution together = Solve(circuits);
        double[] loads = [.. Enumerable.Range(0, Width).Select(together.LoadCurrent)];
        for (int i = 0; i < Width; i++)
        {
            LaneSolution alone = Solve([circuits[i]]);
            Near(alone.LoadCurrent(0), loads[i], 1e-9, 1e-15);
        }
    }

    private static LaneSolution Solve(SinkCircuit[] circuits)
    {
        CircuitLanes lanes = new();
        LaneSolution solution = new();
        Fill(lanes, circuits);
        new LaneSolver().Solve(lanes, solution);
        return solution;
    }

    private static void Fill(CircuitLanes lanes, ReadOnlySpan<SinkCircuit> circuits)
    {
        lanes.Begin(CircuitShape.Of(circuits[0]));
        for (int i = 0; i < circuits.Length; i++)
        {
            lanes.Set(i, circuits[i]);
        }

        lanes.Repeat(circuits.Length - 1);
    }

    /// <summary>Solves cold, holds every solved state to the equations and every n-th to the scalar solver; returns how many were left.</summary>
    private static int Check(SinkCircuit[] circuits, int every)
    {
        CircuitLanes lanes = new();
        LaneSolution solution = new();
        LaneSolver solver = new();
        SinkSolver scalar = new();
        int left = 0;
        for (int start = 0; start < circuits.Length; start += Width)
        {
            Fill(lanes, circuits.AsSpan(start, Width));
            solver.Forget();
            solver.Solve(lanes, solution);
            for (int i = 0; i < Width; i++)
            {
                SinkCircuit circuit = circuits[start + i];
                if (!solution.IsSolved(i))
                {
                    left++;
                    continue;
                }

                Balance(circuit, solution, i);
                if ((start + i) % every == 0)
                {
                    OperatingPoint? expected = scalar.Solve(circuit);
                    Assert.NotNull(expected);
                    Agree(expected, solution.Point(circuit, i));
                }
            }
        }

        return left;
    }

    /// <summary>Kirchhoff at the terminals, with the currents of the scalar device equations at the lane's own voltages: 1e-6, or 1 pA.</summary>
    private static void Balance(SinkCircuit circuit, LaneSolution s, int lane)
    {
        double vb = s.BaseVoltage(lane);
        double vx = s.ControlBaseVoltage(lane);
        double vc = s.CollectorVoltage(lane);
        (double ic0, double ib0) = Currents(circuit.Control, s, 0, lane, vx, 0, vb);
        double sensed = 0;
        double collectors = 0;
        double bases = 0;
        double emitters = 0;
        for (int g = 0; g < circuit.Legs.Count; g++)
        {
            LegGroup leg = circuit.Legs[g];
            double ve = s.EmitterVoltage(g + 1, lane);
            (double ic, double ib) = Currents(leg.Pass, s, g + 1, lane, vb, ve, vc);
            double spread = ic + ib - (ve / leg.Sense);
            emitters += leg.Count * (Math.Abs(ic) + Math.Abs(ib));
            collectors += leg.Count * ic;
            bases += leg.Count * ib;
            if (leg.Sensed)
            {
                sensed += leg.Count * spread;
                Near(vx, ve - (leg.Averaging * spread), 1e-6, 1e-7);
            }
            else
            {
                Near(ve / leg.Sense, ic + ib, 1e-6, 1e-12);
            }
        }

        double feed = (circuit.FeedVoltage - vb) / circuit.FeedResistance;
        Near(ib0, sensed, 1e-6, 1e-12 + (1e-8 * emitters));
        Near(feed - (vb * circuit.BaseConductance) + circuit.BaseLeakage, ic0 + bases, 1e-6, 1e-12 + (1e-8 * Math.Abs(feed)));
        Near(s.LoadCurrent(lane), collectors + circuit.BaseLeakage, 1e-6, 1e-12 + (1e-8 * emitters));
        if (circuit.Load is { IsResistor: true } resistor)
        {
            Near(circuit.Supply - vc, s.LoadCurrent(lane) * resistor.Series, 1e-9, 1e-9);
        }
    }

    private static (double Ic, double Ib) Currents(BipolarDevice device, LaneSolution s, int d, int lane, double vb, double ve, double vc)
    {
        double ic = s.Ic(d, lane);
        double ib = s.Ib(d, lane);
        double inside = vb - (ib * s.BaseResistance(d, lane));
        device.At(s.Temperature(d, lane)).Evaluate(
            inside - ve - ((ic + ib) * device.Parameters.Re), inside - vc + (ic * device.Parameters.Rc), out BipolarCurrents q);

        // The rows of voltages balance to 1e-10 V, 4e-9 of what flows each way through a junction: saturated, far more than comes out.
        double floor = 1e-13 + (1e-7 * (Math.Abs(ic) + Math.Abs(ib)));
        Near(q.Ic, ic, 1e-6, floor);
        Near(q.Ib, ib, 1e-6, floor);
        Near(q.Rbb, s.BaseResistance(d, lane), 1e-6, 1e-9);
        return (q.Ic, q.Ib);
    }

    /// <summary>1e-7 of a current: the scalar solver stops at steps of 1e-10 of up to 30 V, which is that much of a junction's current; or 0.1 nA.</summary>
    private static void Agree(OperatingPoint expected, OperatingPoint actual)
    {
        Near(expected.LoadCurrent, actual.LoadCurrent, 1e-7, 1e-10);
        Near(expected.PinCurrent, actual.PinCurrent, 1e-7, 1e-10);
        Near(expected.BaseVoltage, actual.BaseVoltage, 1e-8, 1e-9);
        if (expected.LoadCurrent > 1e-9)
        {
            // Below, femtoamperes of balance are millivolts over the load.
            Near(expected.CollectorVoltage, actual.CollectorVoltage, 1e-8, 1e-7);
        }

        Near(expected.Control.Ic, actual.Control.Ic, 1e-7, 1e-10);
        Near(expected.Control.Tj, actual.Control.Tj, 1e-8, 0);
        for (int g = 0; g < expected.Legs.Count; g++)
        {
            Near(expected.Legs[g].Ic, actual.Legs[g].Ic, 1e-7, 1e-10);
            Near(expected.Legs[g].Ib, actual.Legs[g].Ib, 1e-7, 1e-10);
            Near(expected.Legs[g].Tj, actual.Legs[g].Tj, 1e-8, 0);

            // A difference of two currents, over resistances down to 1 ohm: the scalar solver's own 1e-10 V.
            Near(expected.AveragingCurrents[g], actual.AveragingCurrents[g], 1e-7, (1e-7 * Math.Abs(expected.Legs[g].Ic)) + 1e-10);
        }
    }

    private static void Near(double expected, double actual, double share, double floor)
    {
        if (!(Math.Abs(expected - actual) <= Math.Max(share * Math.Abs(expected), floor)))
        {
            Assert.Fail(string.Create(CultureInfo.InvariantCulture, $"{actual:g12} where {expected:g12} stands, {Math.Abs(expected - actual) / Math.Abs(expected):g3} apart"));
        }
    }
}
