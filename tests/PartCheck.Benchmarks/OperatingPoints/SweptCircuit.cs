using System.Diagnostics;
using System.Globalization;
using System.Text.RegularExpressions;
using PartCheck.Devices;
using PartCheck.OperatingPoints;

namespace PartCheck.Benchmarks.OperatingPoints;

/// <summary>One leg, everything at 27 degC, its supply swept: for the batch, for the scalar solver and as a deck for ngspice.</summary>
internal static partial class SweptCircuit
{
    /// <summary>Points of a sweep from 22 V to 26 V.</summary>
    public const int Points = 400_000;

    private const double Kelvins = 300.15;

    private static readonly BipolarDevice Device = new(new BipolarParameters { Is = 1e-14, Bf = 200, Vaf = 80, Ise = 1e-14, Ne = 1.5, Ikf = 0.1 });

    private static readonly LoadElement Load = LoadElement.FromConstants(12, 1e-28, 0);

    /// <summary>The circuit at one point of the sweep.</summary>
    public static SinkCircuit At(int point) => new()
    {
        PinVoltage = 5,
        Feed = 4700,
        Supply = 22 + (4.0 * point / Points),
        Load = Load,
        Control = Device,
        ControlHeat = new JunctionHeat(Kelvins, 0, 1000),
        Legs = [new LegGroup(1, Device, 33, 0, true, new JunctionHeat(Kelvins, 0, 1000))],
    };

    /// <summary>
    /// Time of ngspice for one point of the same sweep, its own count of the analysis alone [ns]: nothing saved but one current, default
    /// tolerances, two iterations a point. NaN: not installed.
    /// </summary>
    public static double NgspiceNanoseconds()
    {
        string file = Path.Combine(Path.GetTempPath(), $"partcheck-sweep-{Guid.NewGuid():N}.cir");
        string deck = string.Create(CultureInfo.InvariantCulture, $"""
            * one leg, supply swept
            .options gmin=1e-15
            VP src 0 5
            RF src b 4700
            .model m NPN(IS=1e-14 BF=200 VAF=80 ISE=1e-14 NE=1.5 IKF=0.1)
            QC b x 0 m
            Q0 c b x m
            RS0 x 0 33
            VS s 0 24
            .model ml D(IS=1e-28 N=12 TNOM=25)
            DL s c ml temp=25
            .control
            save i(VS)
            dc VS 22 26 {4.0 / Points:R}
            rusage everything
            .endc
            .end

            """);
        try
        {
            File.WriteAllText(file, deck);
            ProcessStartInfo start = new("ngspice", $"-b \"{file}\"") { RedirectStandardOutput = true, RedirectStandardError = true, UseShellExecute = false };
            using Process process = Process.Start(start)!;
            Task<string> error = process.StandardError.ReadToEndAsync();
            string text = process.StandardOutput.ReadToEnd() + error.Result;
            process.WaitForExit();
            return AnalysisTime().Match(text) is { Success: true } m
                ? double.Parse(m.Groups[1].Value, CultureInfo.InvariantCulture) * 1e9 / Points
                : double.NaN;
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return double.NaN;
        }
        finally
        {
            File.Delete(file);
        }
    }

    [GeneratedRegex(@"Total analysis time \(seconds\) = ([\d.]+)")]
    private static partial Regex AnalysisTime();
}
