using System.Globalization;
using System.Text;
using PartCheck.OperatingPoints;

namespace PartCheck.Tests.Reference;

/// <summary>A reference circuit whose junctions heat themselves: ambient and thermal resistance of control and legs.</summary>
/// <param name="Circuit">The circuit at its final junction temperatures.</param>
/// <param name="Ambient">Ambient temperature [degC].</param>
/// <param name="Rth">Thermal resistances [K/W], the control's first, then the legs'.</param>
/// <param name="Coupling">Heating of the control by each leg [K/W].</param>
public sealed record HeatedCircuit(ReferenceCircuit Circuit, double Ambient, IReadOnlyList<double> Rth, double Coupling = 0)
{
    /// <summary>The circuit for the project's solver, which finds the temperatures itself.</summary>
    public SinkCircuit ToSink()
    {
        SinkCircuit given = Circuit.ToSink();
        JunctionHeat Heat(int device) => new(Ambient + 273.15, Rth[device], 1000);
        return given with { ControlHeat = Heat(0), Legs = [.. given.Legs.Select((leg, i) => leg with { Heat = Heat(i + 1) })] };
    }
}

/// <summary>
/// Junction temperatures by fixed point: ngspice solves the circuit at given temperatures, each junction moves to ambient plus its
/// printed power times its resistance, until none moves by more than 0.1 mK. The project's solver has no part in it.
/// </summary>
public static class HeatedReference
{
    /// <summary>Iterates a circuit; null where ngspice fails or a junction passes 175 degC.</summary>
    public static (HeatedCircuit Heated, ReferenceResult Result)? Iterate(
        ReferenceCircuit circuit, double ambient, IReadOnlyList<double> rth, double coupling = 0)
    {
        double[] celsius = [.. Enumerable.Repeat(ambient, rth.Count)];
        for (int round = 0; round < 100; round++)
        {
            ReferenceCircuit at = circuit with
            {
                Control = circuit.Control with { Celsius = celsius[0] },
                Legs = [.. circuit.Legs.Select((leg, i) => leg with { Pass = leg.Pass with { Celsius = celsius[i + 1] } })],
            };
            if (Ngspice.Solve(at) is not { } r)
            {
                return null;
            }

            double moved = 0;
            double legs = 0;
            for (int d = celsius.Length - 1; d >= 0; d--)
            {
                double power = d == 0
                    ? (r.BaseVoltage * r.ControlIc) + (r.ControlBaseVoltage * r.ControlIb)
                    : ((r.CollectorVoltage - r.Emitter[d - 1]) * r.Ic[d - 1]) + ((r.BaseVoltage - r.Emitter[d - 1]) * r.Ib[d - 1]);
                double next = ambient + (rth[d] * power) + (d == 0 ? coupling * legs : 0);
                legs += power;
                moved = Math.Max(moved, Math.Abs(next - celsius[d]));
                celsius[d] = next;
            }

            if (celsius.Any(c => c > 175))
            {
                return null;
            }

            if (moved < 1e-4)
            {
                return (new HeatedCircuit(at, ambient, rth, coupling), r);
            }
        }

        return null;
    }

    /// <summary>Every row: ambient and resistances stand in its name.</summary>
    public static IReadOnlyList<(HeatedCircuit Heated, ReferenceResult Result)> Read() =>
        [.. ReferenceTable.Read(ReferenceTable.Heated).Select(r =>
        {
            string[] name = r.Circuit.Name.Split('@');
            double[] numbers = [.. name[1].Split('_').Select(n => double.Parse(n, CultureInfo.InvariantCulture))];
            return (new HeatedCircuit(r.Circuit, numbers[0], numbers[1..]), r.Result);
        })];

    /// <summary>Forty circuits, made from the generator's regulating and starved ones, iterated in ngspice; each heats a leg by more than 10 K.</summary>
    public static IReadOnlyList<(ReferenceCircuit, ReferenceResult)> Make()
    {
        List<(ReferenceCircuit, ReferenceResult)> rows = [];
        foreach (ReferenceCircuit circuit in ReferenceGenerator.Circuits(400).Where(c => c.Name.StartsWith("reg", StringComparison.Ordinal) || c.Name.StartsWith("drop", StringComparison.Ordinal)))
        {
            int number = int.Parse(circuit.Name.Split('-')[^1], CultureInfo.InvariantCulture);
            double ambient = -40 + (number * 37 % 120);
            double[] rth = [.. Enumerable.Range(0, circuit.Legs.Count + 1).Select(d => 200.0 + (((number * 53) + (d * 97)) % 700))];
            if (rows.Count < 40 && Iterate(circuit, ambient, rth) is { } heated
                && heated.Heated.Circuit.Legs.Any(l => l.Pass.Celsius - ambient > 10) && HasOneEquilibrium(heated))
            {
                StringBuilder name = new(circuit.Name);
                name.Append('@').Append(ambient.ToString(CultureInfo.InvariantCulture));
                foreach (double r in rth)
                {
                    name.Append('_').Append(r.ToString(CultureInfo.InvariantCulture));
                }

                rows.Add((heated.Heated.Circuit with { Name = name.ToString() }, heated.Result));
            }
        }

        return rows;
    }

    /// <summary>
    /// Legs that share a control have several equilibria where the loop gain of their difference passes 1 (one leg or another takes it
    /// all): VCE Rth 2 mV/K over Rs parallel Ra plus VT/IC, held below 0.8 here.
    /// </summary>
    private static bool HasOneEquilibrium((HeatedCircuit Heated, ReferenceResult Result) heated)
    {
        IReadOnlyList<ReferenceLeg> legs = heated.Heated.Circuit.Legs;
        return legs.Count == 1 || Enumerable.Range(0, legs.Count).All(i =>
        {
            double ballast = legs[i].Sensed ? legs[i].Sense * legs[i].Averaging / (legs[i].Sense + legs[i].Averaging) : legs[i].Sense;
            double ic = heated.Result.Ic[i];
            double vce = heated.Result.CollectorVoltage - heated.Result.Emitter[i];
            return ic <= 0 || vce * heated.Heated.Rth[i + 1] * 2e-3 / (ballast + (0.025 / ic)) < 0.8;
        });
    }
}
