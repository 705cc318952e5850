using System.Globalization;
using PartCheck.OperatingPoints;
using PartCheck.Tests.Reference;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>The solver against the recorded table: 0.1 %, or 1 nA and 10 uV where currents vanish.</summary>
public class NgspiceAgreementTests
{
    private const double Share = 1e-3;
    private const double Amperes = 1e-9;
    private const double Volts = 10e-6;

    [Fact]
    public void EveryRecordedCircuitAgrees()
    {
        IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> rows = ReferenceTable.Read();
        Assert.InRange(rows.Count, 300, 10_000);
        SinkSolver solver = new();
        List<string> wrong = [];
        double worst = 0;
        string worstAt = "none";
        foreach ((ReferenceCircuit circuit, ReferenceResult expected) in rows)
        {
            OperatingPoint? point = solver.Solve(circuit.ToSink());
            if (point is null)
            {
                wrong.Add($"{circuit.Name}: NotSolved {solver.Failure}");
                continue;
            }

            void Hold(string what, double reference, double actual, double floor)
            {
                double share = Math.Abs(actual - reference) / Math.Max(Share * Math.Abs(reference), floor);
                string Figure() => string.Create(CultureInfo.InvariantCulture, $"{circuit.Name} {what}: {actual:g8}, ngspice {reference:g8}");
                if (!(share <= 1))
                {
                    wrong.Add(Figure());
                }

                if (share > worst)
                {
                    (worst, worstAt) = (share, Figure());
                }
            }

            Hold("load current", expected.LoadCurrent, point.LoadCurrent, Amperes);
            Hold("pin current", expected.PinCurrent, point.PinCurrent, Amperes);
            Hold("base node", expected.BaseVoltage, point.BaseVoltage, Volts);
            Hold("control base", expected.ControlBaseVoltage, point.ControlBaseVoltage, Volts);
            Hold("control IC", expected.ControlIc, point.Control.Ic, Amperes);
            Hold("control IB", expected.ControlIb, point.Control.Ib, Amperes);
            for (int i = 0; i < circuit.Legs.Count; i++)
            {
                Hold($"IC {i}", expected.Ic[i], point.Legs[i].Ic, Amperes);
                Hold($"IB {i}", expected.Ib[i], point.Legs[i].Ib, Amperes);
                Hold($"emitter {i}", expected.Emitter[i], point.Legs[i].EmitterVoltage, Volts);
            }
        }

        Assert.True(
            wrong.Count == 0,
            string.Create(CultureInfo.InvariantCulture, $"{wrong.Count} deviations, the worst {worst:g3} times the tolerance ({worstAt}):\n")
                + string.Join("\n", wrong.Take(25)));
    }

    /// <summary>The solver finds the junction temperatures itself: 0.5 K, and 0.2 % of the currents.</summary>
    [Fact]
    public void EveryHeatedCircuitAgrees()
    {
        IReadOnlyList<(HeatedCircuit Heated, ReferenceResult Result)> rows = HeatedReference.Read();
        Assert.Equal(40, rows.Count);
        SinkSolver solver = new();
        foreach ((HeatedCircuit heated, ReferenceResult expected) in rows)
        {
            OperatingPoint? point = solver.Solve(heated.ToSink());
            Assert.True(point is not null, $"{heated.Circuit.Name}: {solver.Failure}");
            Assert.True(
                Math.Abs(point.LoadCurrent - expected.LoadCurrent) <= Math.Max(2e-3 * Math.Abs(expected.LoadCurrent), Amperes),
                string.Create(CultureInfo.InvariantCulture, $"{heated.Circuit.Name}: load {point.LoadCurrent:g6}, ngspice {expected.LoadCurrent:g6}; Tj {string.Join(' ', point.Legs.Select(l => $"{l.Tj - 273.15:0.0}"))}, ngspice {string.Join(' ', heated.Circuit.Legs.Select(l => $"{l.Pass.Celsius:0.0}"))}"));
            Assert.InRange(point.Control.Tj - 273.15 - heated.Circuit.Control.Celsius, -0.5, 0.5);
            for (int i = 0; i < heated.Circuit.Legs.Count; i++)
            {
                Assert.InRange(point.Legs[i].Tj - 273.15 - heated.Circuit.Legs[i].Pass.Celsius, -0.5, 0.5);
                Assert.InRange(Math.Abs(point.Legs[i].Ic - expected.Ic[i]), 0, Math.Max(2e-3 * Math.Abs(expected.Ic[i]), Amperes));
            }
        }

        // The table means something only where junctions are well above ambient.
        Assert.InRange(rows.Count(r => r.Heated.Circuit.Legs.Any(l => l.Pass.Celsius - r.Heated.Ambient > 20)), 15, 40);
    }

    [Theory]
    [InlineData("regulating")]
    [InlineData("drop-out")]
    [InlineData("off")]
    [InlineData("unfed")]
    public void TheTableHoldsEveryKindWithOneToEightLegs(string kind)
    {
        HashSet<int> legs = [.. ReferenceTable.Read().Where(r => r.Circuit.Name.StartsWith(kind, StringComparison.Ordinal)).Select(r => r.Circuit.Legs.Count)];
        Assert.Equal([1, 2, 3, 4, 5, 6, 7, 8], legs.Order());
    }
}
