using System.Globalization;
using System.Runtime.CompilerServices;

namespace PartCheck.Tests.Reference;

/// <summary>Records the reference tables with ngspice, into the source folder.</summary>
internal static class Recording
{
    /// <summary>Channels at given junction temperatures.</summary>
    /// <returns>Rows written.</returns>
    public static int Channels()
    {
        List<(ReferenceCircuit, ReferenceResult)> rows = [];
        int[] rungs = new int[Ngspice.Options.Count];
        int dropped = 0;
        foreach (ReferenceCircuit circuit in ReferenceGenerator.Circuits(400))
        {
            if (Ngspice.Solve(circuit, out int rung) is { } result)
            {
                rungs[rung]++;
                rows.Add((circuit, result));
            }
            else
            {
                dropped++;
            }
        }

        ReferenceTable.Write(
            Path.Combine(SourceFolder(), ReferenceTable.Channels),
            [
                "Operating points of LED current-sink channels at given junction temperatures",
                .. Ngspice.Options.Select((options, i) => string.Create(
                    CultureInfo.InvariantCulture,
                    $"{(i == 0 ? $"Source: {Ngspice.Version()} (Debian package)," : "Where that found no operating point:")} .options {options} ({rungs[i]} circuits)")),
                string.Create(
                    CultureInfo.InvariantCulture,
                    $"Made by: ReferenceGenerator (seeds 0x5EED0000 + i) and Ngspice, with PARTCHECK_RECORD_NGSPICE=1; {rows.Count} circuits, {dropped} dropped for want of an operating point with any of the options"),
                "Tolerance of the comparison: 0.1 %, or 1 nA and 10 uV where currents vanish. SI units, junction temperatures in degC",
            ],
            rows);
        return rows.Count;
    }

    /// <summary>Channels that heat themselves.</summary>
    /// <returns>Rows written.</returns>
    public static int Heated()
    {
        IReadOnlyList<(ReferenceCircuit, ReferenceResult)> rows = HeatedReference.Make();
        ReferenceTable.Write(
            Path.Combine(SourceFolder(), ReferenceTable.Heated),
            [
                "Self-heated LED current-sink channels: junction temperatures by fixed point in ngspice (no junction moves by more than 0.1 mK)",
                $"Source: {Ngspice.Version()} (Debian package), .options {Ngspice.Options[0]}",
                "Made by: HeatedReference with PARTCHECK_RECORD_NGSPICE=1; behind @ in the name: ambient in degC, then RthJA in K/W of the control and of each leg",
                "Left out: circuits with several equilibria (thermal loop gain between legs above 0.8; the rule stability refuses them)",
                "Tolerance of the comparison: 0.2 % and 0.5 K. SI units, junction temperatures in degC",
            ],
            rows);
        return rows.Count;
    }

    /// <summary>Channels that heat themselves in pulses.</summary>
    /// <returns>Rows written.</returns>
    public static int Pulsed()
    {
        IReadOnlyList<(ReferenceCircuit, ReferenceResult)> rows = PulsedReference.Make();
        ReferenceTable.Write(
            Path.Combine(SourceFolder(), ReferenceTable.Pulsed),
            [
                "LED current-sink channels under PWM at the end of a pulse: junction temperatures by fixed point in ngspice (no junction moves by more than 0.1 mK)",
                $"Source: {Ngspice.Version()} (Debian package), .options {Ngspice.Options[0]}",
                "Made by: PulsedReference with PARTCHECK_RECORD_NGSPICE=1; behind @ in the name: ambient in degC, then the effective thermal resistance in K/W of the control and of each leg, by hand (the arithmetic stands in PulsedReference), then behind @ what each leg's power heats the control by in K/W",
                "Tolerance of the comparison: 0.1 % and 0.05 K. SI units, junction temperatures in degC",
            ],
            rows);
        return rows.Count;
    }

    private static string SourceFolder([CallerFilePath] string file = "") => Path.GetDirectoryName(file)!;
}
