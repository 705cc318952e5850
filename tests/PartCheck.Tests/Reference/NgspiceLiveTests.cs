using PartCheck.OperatingPoints;
using Xunit;

namespace PartCheck.Tests.Reference;

/// <summary>The recorded table against a live ngspice.</summary>
public class NgspiceLiveTests
{
    private const double Amperes = 1e-12;
    private const double Volts = 1e-7;

    [Fact]
    public void ASampleOfTheRecordedCircuitsComesOutOfNgspiceAgain()
    {
        Assert.SkipUnless(Ngspice.Absence is null, Ngspice.Absence ?? string.Empty);
        IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> rows = ReferenceTable.Read();
        HashSet<string> kinds = [];
        HashSet<int> legs = [];
        int compared = 0;

        // Kinds repeat every ten rows: a step of eleven meets all of them.
        for (int i = 3; i < rows.Count; i += 11)
        {
            (ReferenceCircuit circuit, ReferenceResult recorded) = rows[i];
            ReferenceResult? live = Ngspice.Solve(circuit);
            Assert.NotNull(live);
            Close(recorded.LoadCurrent, live.LoadCurrent, Amperes);
            Close(recorded.PinCurrent, live.PinCurrent, Amperes);
            Close(recorded.BaseVoltage, live.BaseVoltage, Volts);
            Close(recorded.ControlBaseVoltage, live.ControlBaseVoltage, Volts);
            Close(recorded.ControlIc, live.ControlIc, Amperes);
            Close(recorded.ControlIb, live.ControlIb, Amperes);
            Close(recorded.Ic, live.Ic, Amperes);
            Close(recorded.Ib, live.Ib, Amperes);
            Close(recorded.Emitter, live.Emitter, Volts);
            kinds.Add(circuit.Name[..circuit.Name.LastIndexOf('-')]);
            legs.Add(circuit.Legs.Count);
            compared++;
        }

        Assert.InRange(compared, 30, 1000);
        Assert.Equal(["drop-out", "off", "regulating", "unfed"], kinds.Order(StringComparer.Ordinal));
        Assert.Equal([1, 2, 3, 4, 5, 6, 7, 8], legs.Order());
    }

    /// <summary>Sense resistors below those of the table, down to 5 ohm: the solver against a live ngspice, 0.1 % of every leg's currents.</summary>
    [Fact]
    public void LowSenseResistorsAgreeLive()
    {
        Assert.SkipUnless(Ngspice.Absence is null, Ngspice.Absence ?? string.Empty);
        SinkSolver solver = new();
        int compared = 0;
        foreach (ReferenceCircuit made in ReferenceGenerator.Circuits(400).Where((_, i) => i % 20 is 0 or 14))
        {
            ReferenceCircuit circuit = made with { Legs = [.. made.Legs.Select((l, i) => l with { Sense = 5 + i })] };
            ReferenceResult? live = Ngspice.Solve(circuit);
            Assert.NotNull(live);
            OperatingPoint? point = solver.Solve(circuit.ToSink());
            Assert.True(point is not null, $"{circuit.Name}: {solver.Failure}");
            for (int i = 0; i < circuit.Legs.Count; i++)
            {
                Assert.InRange(Math.Abs(point.Legs[i].Ic - live.Ic[i]), 0, Math.Max(1e-3 * Math.Abs(live.Ic[i]), 1e-9));
                Assert.InRange(Math.Abs(point.Legs[i].Ib - live.Ib[i]), 0, Math.Max(1e-3 * Math.Abs(live.Ib[i]), 1e-9));
            }

            compared++;
        }

        Assert.Equal(40, compared);
    }

    /// <summary>The inputs of the tables are those of the generator; with PARTCHECK_RECORD_NGSPICE=1 the tables are recorded anew first.</summary>
    [Fact]
    public void TheTablesHoldWhatTheGeneratorMakes()
    {
        if (Environment.GetEnvironmentVariable("PARTCHECK_RECORD_NGSPICE") == "1")
        {
            Assert.InRange(Recording.Channels(), 340, 400);
            Assert.Equal(40, Recording.Heated());
            Assert.Equal(4, Recording.Pulsed());
            return;
        }

        Dictionary<string, ReferenceCircuit> made = ReferenceGenerator.Circuits(400).ToDictionary(c => c.Name);
        Assert.All(ReferenceTable.Read(), row => Assert.Equal(Ngspice.Deck(made[row.Circuit.Name], Ngspice.Options[0]), Ngspice.Deck(row.Circuit, Ngspice.Options[0])));
        Assert.Equal(40, HeatedReference.Read().Count);
        Assert.Equal(PulsedReference.Cases.Select(c => c.Name), PulsedReference.Read().Select(r => r.Heated.Circuit.Name));
    }

    [Fact]
    public void ASampleOfTheHeatedCircuitsStandsStillInNgspice()
    {
        Assert.SkipUnless(Ngspice.Absence is null, Ngspice.Absence ?? string.Empty);
        foreach ((HeatedCircuit heated, ReferenceResult recorded) in HeatedReference.Read().Where((_, i) => i % 8 == 0))
        {
            ReferenceResult? live = Ngspice.Solve(heated.Circuit);
            Assert.NotNull(live);
            Close(recorded.LoadCurrent, live.LoadCurrent, Amperes);
            double power = ((live.CollectorVoltage - live.Emitter[0]) * live.Ic[0]) + ((live.BaseVoltage - live.Emitter[0]) * live.Ib[0]);
            Assert.InRange(heated.Ambient + (heated.Rth[1] * power) - heated.Circuit.Legs[0].Pass.Celsius, -0.01, 0.01);
        }
    }

    [Fact]
    public void ThePulsedCircuitsStandStillInNgspice()
    {
        Assert.SkipUnless(Ngspice.Absence is null, Ngspice.Absence ?? string.Empty);
        foreach ((HeatedCircuit heated, ReferenceResult recorded) in PulsedReference.Read())
        {
            ReferenceResult? live = Ngspice.Solve(heated.Circuit);
            Assert.NotNull(live);
            Close(recorded.LoadCurrent, live.LoadCurrent, Amperes);
            double power = ((live.CollectorVoltage - live.Emitter[0]) * live.Ic[0]) + ((live.BaseVoltage - live.Emitter[0]) * live.Ib[0]);
            double control = (live.BaseVoltage * live.ControlIc) + (live.ControlBaseVoltage * live.ControlIb);
            Assert.InRange(heated.Ambient + (heated.Rth[1] * power) - heated.Circuit.Legs[0].Pass.Celsius, -0.01, 0.01);
            double coupled = heated.Coupling * power * heated.Circuit.Legs.Count;
            Assert.InRange(heated.Ambient + (heated.Rth[0] * control) + coupled - heated.Circuit.Control.Celsius, -0.01, 0.01);
        }
    }

    private static void Close(double recorded, double live, double floor) =>
        Assert.InRange(Math.Abs(recorded - live), 0, (1e-6 * Math.Abs(recorded)) + floor);

    private static void Close(IReadOnlyList<double> recorded, IReadOnlyList<double> live, double floor)
    {
        Assert.Equal(recorded.Count, live.Count);
        for (int i = 0; i < recorded.Count; i++)
        {
            Close(recorded[i], live[i], floor);
        }
    }
}
