using System.Runtime.CompilerServices;
using Xunit;

namespace PartCheck.Tests.Reference;

/// <summary>The recorded table against a live ngspice.</summary>
public class NgspiceLiveTests
{
    [Fact]
    public void EveryTenthRecordedCircuitComesOutOfNgspiceAgain()
    {
        Assert.SkipUnless(Ngspice.Absence is null, Ngspice.Absence ?? string.Empty);
        IReadOnlyList<(ReferenceCircuit Circuit, ReferenceResult Result)> rows = ReferenceTable.Read();
        int compared = 0;
        for (int i = 3; i < rows.Count; i += 10)
        {
            ReferenceResult? live = Ngspice.Solve(rows[i].Circuit);
            Assert.NotNull(live);
            Close(rows[i].Result.LoadCurrent, live.LoadCurrent, 1e-12);
            Close(rows[i].Result.PinCurrent, live.PinCurrent, 1e-12);
            Close(rows[i].Result.BaseVoltage, live.BaseVoltage, 1e-7);
            Close(rows[i].Result.ControlIc, live.ControlIc, 1e-12);
            compared++;
        }

        Assert.InRange(compared, 30, 1000);
    }

    [Fact]
    public void TheTableIsRecordedAnewWhereAsked()
    {
        Assert.SkipUnless(
            Environment.GetEnvironmentVariable("PARTCHECK_RECORD_NGSPICE") == "1",
            "recording is asked for with PARTCHECK_RECORD_NGSPICE=1");
        List<(ReferenceCircuit, ReferenceResult)> rows = [];
        int dropped = 0;
        foreach (ReferenceCircuit circuit in ReferenceGenerator.Circuits(400))
        {
            if (Ngspice.Solve(circuit) is { } result)
            {
                rows.Add((circuit, result));
            }
            else
            {
                dropped++;
            }
        }

        ReferenceTable.Write(SourceFolder(), rows, dropped);
        Assert.InRange(rows.Count, 300, 400);
    }

    private static string SourceFolder([CallerFilePath] string file = "") => Path.GetDirectoryName(file)!;

    private static void Close(double recorded, double live, double floor) =>
        Assert.InRange(Math.Abs(recorded - live), 0, (1e-6 * Math.Abs(recorded)) + floor);
}
