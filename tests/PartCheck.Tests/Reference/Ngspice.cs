using System.Diagnostics;
using System.Globalization;
using System.Text;
using System.Text.RegularExpressions;
using PartCheck.Channels;

namespace PartCheck.Tests.Reference;

/// <summary>Runs reference circuits in ngspice (Debian), an independent solver.</summary>
public static partial class Ngspice
{
    /// <summary>
    /// Options of a run, tightest first: the next is taken only where ngspice finds no operating point with the one before
    /// (transistors off, femtoamperes into a string of LEDs). Measured on the recorded table: reltol 1e-6 for 1e-8, or gmin 1e-18 for
    /// 1e-15, moves no compared figure by more than a twentieth of the tolerance (the worst: 0.005 % of one collector current in
    /// drop-out). gmin 1e-12 would move the load current of one channel that is off by 0.4 nA. epsmin: ngspice otherwise lifts a saturation current to 1e-28 A.
    /// </summary>
    public static IReadOnlyList<string> Options { get; } =
    [
        "reltol=1e-8 abstol=1e-16 vntol=1e-10 " + Common,
        "reltol=1e-6 abstol=1e-14 vntol=1e-8 " + Common,
        "reltol=1e-5 abstol=1e-13 vntol=1e-7 " + Common,
    ];

    private const string Common = "gmin=1e-15 epsmin=1e-100 itl1=2000 itl6=200";

    /// <summary>Why a test that needs ngspice cannot run; null: it can.</summary>
    public static string? Absence { get; } = Version() is null ? "ngspice is not installed: the live comparison is left out, the recorded table still runs" : null;

    /// <summary>First words that ngspice prints of itself; null: not installed.</summary>
    public static string? Version()
    {
        try
        {
            string text = Start("--version");
            return VersionLine().Match(text) is { Success: true } match ? match.Value : null;
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return null;
        }
    }

    /// <summary>Solves a circuit with the tightest options that find an operating point; null where none does.</summary>
    public static ReferenceResult? Solve(ReferenceCircuit circuit) => Solve(circuit, out _);

    /// <summary>Solves a circuit.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="rung">Index into <see cref="Options"/> of the options that found the operating point.</param>
    public static ReferenceResult? Solve(ReferenceCircuit circuit, out int rung)
    {
        for (rung = 0; rung < Options.Count; rung++)
        {
            if (Run(circuit, Options[rung]) is { } result)
            {
                return result;
            }
        }

        return null;
    }

    private static ReferenceResult? Run(ReferenceCircuit circuit, string options)
    {
        string file = Path.Combine(Path.GetTempPath(), $"partcheck-{Guid.NewGuid():N}.cir");
        try
        {
            File.WriteAllText(file, Deck(circuit, options));
            string text = Start($"-b \"{file}\"");
            Dictionary<string, double> values = [];
            foreach (Match match in ValueLine().Matches(text))
            {
                values[match.Groups["k"].Value.ToUpperInvariant()] = double.Parse(match.Groups["v"].Value, NumberStyles.Float, CultureInfo.InvariantCulture);
            }

            if (!values.TryGetValue("V(B)", out double baseNode) || !values.TryGetValue("@QC[IC]", out double controlIc))
            {
                return null;
            }

            int n = circuit.Legs.Count;
            return new ReferenceResult(
                circuit.Unfed ? 0 : -values["I(VS)"], -values["I(VP)"], baseNode, values["V(X)"], values["V(C)"], controlIc, values["@QC[IB]"],
                [.. Enumerable.Range(0, n).Select(i => values[Key($"@Q{i}[IC]")])],
                [.. Enumerable.Range(0, n).Select(i => values[Key($"@Q{i}[IB]")])],
                [.. circuit.Legs.Select((leg, i) => values[Key($"V({Emitter(leg, i)})")])]);
        }
        finally
        {
            File.Delete(file);
        }
    }

    /// <summary>The netlist of a circuit.</summary>
    public static string Deck(ReferenceCircuit c, string options)
    {
        StringBuilder deck = new();
        void Line(FormattableString text) => deck.Append(text.ToString(CultureInfo.InvariantCulture)).Append('\n');
        Line($"* {c.Name}");
        Line($".options {options}");
        Line($"VP src 0 {c.PinVoltage:R}");
        if (c.PinResistance > 0)
        {
            Line($"RP src pin {c.PinResistance:R}");
        }

        string pin = c.PinResistance > 0 ? "pin" : "src";
        Line($"RF {pin} b {c.Feed:R}");
        if (double.IsFinite(c.PullDown))
        {
            Line($"RD {(c.PullDownAt == PullDownAt.Base ? "b" : pin)} 0 {c.PullDown:R}");
        }

        Line($".model mc NPN({ReferenceCircuit.CardText(c.Control.Card)})");
        Line($"QC b x 0 mc temp={c.Control.Celsius:R}");
        for (int i = 0; i < c.Legs.Count; i++)
        {
            ReferenceLeg leg = c.Legs[i];
            string e = Emitter(leg, i);
            Line($".model m{i} NPN({ReferenceCircuit.CardText(leg.Pass.Card)})");
            Line($"Q{i} c b {e} m{i} temp={leg.Pass.Celsius:R}");
            Line($"RS{i} {e} 0 {leg.Sense:R}");
            if (leg.Sensed && leg.Averaging > 0)
            {
                Line($"RA{i} {e} x {leg.Averaging:R}");
            }
        }

        if (!c.Unfed)
        {
            Line($"VS s 0 {c.Supply:R}");
            if (c.LoadEmission > 0)
            {
                Line($".model ml D(IS={c.LoadSaturation:R} N={c.LoadEmission:R} TNOM=25)");
                Line($"DL {(c.LoadSeries > 0 ? "a" : "s")} c ml temp=25");
                if (c.LoadSeries > 0)
                {
                    Line($"RL s a {c.LoadSeries:R}");
                }
            }
            else
            {
                Line($"RL s c {c.LoadSeries:R}");
            }
        }

        Line($".control");
        Line($"set numdgt=13");
        Line($"op");
        Line($"print v(b) v(x) v(c) i(VP) @qc[ic] @qc[ib]");
        if (!c.Unfed)
        {
            Line($"print i(VS)");
        }

        for (int i = 0; i < c.Legs.Count; i++)
        {
            Line($"print @q{i}[ic] @q{i}[ib] v({Emitter(c.Legs[i], i)})");
        }

        Line($".endc");
        Line($".end");
        return deck.ToString();
    }

    private static string Emitter(ReferenceLeg leg, int index) =>
        leg.Sensed && leg.Averaging == 0 ? "x" : string.Create(CultureInfo.InvariantCulture, $"e{index}");

    private static string Key(FormattableString text) => text.ToString(CultureInfo.InvariantCulture).ToUpperInvariant();

    private static string Start(string arguments)
    {
        ProcessStartInfo start = new("ngspice", arguments) { RedirectStandardOutput = true, RedirectStandardError = true, UseShellExecute = false };
        start.Environment["LC_ALL"] = "C";
        using Process process = Process.Start(start)!;
        Task<string> error = process.StandardError.ReadToEndAsync();
        string text = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        return text + error.Result;
    }

    [GeneratedRegex(@"^(?<k>[@A-Za-z0-9_()\[\]]+) = (?<v>[-+]?\d+\.?\d*(e[-+]?\d+)?)\s*$", RegexOptions.Multiline | RegexOptions.IgnoreCase)]
    private static partial Regex ValueLine();

    [GeneratedRegex(@"ngspice-\d+")]
    private static partial Regex VersionLine();
}
