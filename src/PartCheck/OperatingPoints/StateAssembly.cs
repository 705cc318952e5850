using PartCheck.Channels;
using PartCheck.Parts;

namespace PartCheck.OperatingPoints;

/// <summary>Turns a solved circuit into the state that rules read.</summary>
internal static class StateAssembly
{
    public static SolvedState Build(
        ChannelModel model, PinSource pin, ChannelState state, in BoxCorner at, int oddClass, OperatingPoint point, DriveEdge? drive, int index)
    {
        SinkCircuit circuit = at.Circuit;
        TransistorPoint[] transistors = new TransistorPoint[circuit.Legs.Count + 1];
        List<ResistorPoint> resistors = new((2 * circuit.Legs.Count) + 2);
        bool gain = true;
        IReadOnlyList<LegCell> cells = model.Cells(oddClass);
        for (int g = 0; g < cells.Count; g++)
        {
            int c = cells[g].Class;
            SolvedTransistor q = point.Legs[g];
            transistors[g] = Leg(model, c, circuit.Legs[g], q);
            gain &= model.Pass[c].GainHolds(q.Ic, cells[g].Odd ? at.Corner.OddPass.Hfe : at.Corner.Pass.Hfe);
            AddLeg(resistors, model, c, circuit.Legs[g], q, point, g);
        }

        transistors[^1] = Transistor(model, model.Slots.Control, Role.Control, model.Control.Part, model.ControlHeat, point.Control);
        AddPackages(transistors, model, cells, at.Corner.NeighboursOn ?? false);
        AddShared(resistors, model, circuit, point);
        return new SolvedState
        {
            State = state,
            Corner = at.Corner,
            Circuit = circuit,
            Index = index,
            BaseVoltage = point.BaseVoltage,
            ControlBaseVoltage = point.ControlBaseVoltage,
            CollectorVoltage = point.CollectorVoltage,
            LoadCurrent = point.LoadCurrent,
            PinCurrent = point.PinCurrent,
            PinGuaranteed = at.Strong || point.PinCurrent + pin.Others <= pin.GuaranteedCurrent,
            GainGuaranteed = gain,
            ControlGainGuaranteed = model.Control.GainHolds(point.Control.Ic, at.Corner.Control.Hfe),
            LowestHeadroom = at.LowestHeadroom && state == ChannelState.On,
            Transistors = transistors,
            Resistors = resistors,
            Package = circuit.Package,
            Warmed = Warmed(circuit, at.Corner.Ambient),
            Drive = drive,
        };
    }

    /// <summary>A state with one transistor point a leg, in leg order: nominal and off.</summary>
    public static SolvedState BuildByLeg(ChannelModel model, ChannelState state, Corner corner, SinkCircuit circuit, OperatingPoint point)
    {
        TransistorPoint[] transistors = new TransistorPoint[circuit.Legs.Count + 1];
        List<ResistorPoint> resistors = [];
        for (int g = 0; g < circuit.Legs.Count; g++)
        {
            int c = CircuitAssembly.ClassOf(model, model.Channel.Legs[g]);
            transistors[g] = Leg(model, c, circuit.Legs[g], point.Legs[g]);
            AddLeg(resistors, model, c, circuit.Legs[g], point.Legs[g], point, g);
        }

        transistors[^1] = Transistor(model, model.Slots.Control, Role.Control, model.Control.Part, model.ControlHeat, point.Control);
        AddShared(resistors, model, circuit, point);
        return new SolvedState
        {
            State = state,
            Corner = corner,
            Circuit = circuit,
            Index = -1,
            BaseVoltage = point.BaseVoltage,
            ControlBaseVoltage = point.ControlBaseVoltage,
            CollectorVoltage = point.CollectorVoltage,
            LoadCurrent = point.LoadCurrent,
            PinCurrent = point.PinCurrent,
            Transistors = transistors,
            Resistors = resistors,
            Package = circuit.Package,
            Warmed = Warmed(circuit, corner.Ambient),
        };
    }

    /// <summary>By how much elements of other channels warm each device; empty: nothing does.</summary>
    private static double[] Warmed(SinkCircuit circuit, double ambient)
    {
        double[] rises = [circuit.ControlHeat.Base - ambient, .. circuit.Legs.Select(l => l.Heat.Base - ambient)];
        return rises.Any(r => r > 0) ? rises : [];
    }

    /// <summary>Gives each transistor that shares its package the power of all its elements, averaged where <c>power</c> averages.</summary>
    private static void AddPackages(TransistorPoint[] points, ChannelModel model, IReadOnlyList<LegCell> cells, bool neighboursOn)
    {
        for (int g = 0; g < points.Length && model.Package.Shares; g++)
        {
            int device = g == cells.Count ? 0 : cells[g].Legs[0] + 1;
            if (model.Package.IsShared(device))
            {
                double sum = (points[g].Power * points[g].AveragedShare) + (neighboursOn ? model.Package.NeighbourPower(device) : 0);
                foreach (int partner in model.Package.Partners(device))
                {
                    for (int by = 0; by < points.Length; by++)
                    {
                        sum += (by == cells.Count ? partner == 0 : partner > 0 && cells[by].Legs.Contains(partner - 1)) ? points[by].Power * points[by].AveragedShare : 0;
                    }
                }

                points[g] = points[g] with { PackagePower = sum };
            }
        }
    }

    private static TransistorPoint Transistor(ChannelModel model, int slot, Role role, Transistor part, PulsedHeat heat, in SolvedTransistor q) =>
        new(slot, role, part, q.Vce, q.CollectorVoltage - q.BaseVoltage, q.Ic, q.Ib, q.Power, q.Tj, q.Held)
        {
            AveragedShare = PulsedHeat.AveragedShare(model.Channel.Conditions),
            CaseShare = heat.CaseShare,
            BaseResistance = q.BaseResistance,
        };

    private static TransistorPoint Leg(ChannelModel model, int c, LegGroup leg, in SolvedTransistor q) =>
        Transistor(model, Slots.Pass(c), Role.Pass, model.Pass[c].Part, model.PassHeat[c], q) with
        {
            VbeSlope = q.VbeSlope,
            EmitterResistance = leg.Pass.Parameters.Re,
            BaseResistance = q.BaseResistance,
            Ballast = leg.Sensed && !model.OneLegSensed ? leg.Sense * leg.Averaging / (leg.Sense + leg.Averaging) : leg.Sense,
            RthJa = model.PassRth[c] ?? double.NaN,
            SenseVoltage = q.EmitterVoltage,
            SenseResistance = leg.Sense,
            NominalSense = model.Sense[c].Nominal,
            Count = leg.Count,
        };

    private static void AddLeg(
        List<ResistorPoint> resistors, ChannelModel model, int c, LegGroup leg, in SolvedTransistor q, OperatingPoint point, int g)
    {
        double ve = Math.Abs(q.EmitterVoltage);
        resistors.Add(new ResistorPoint(Slots.Sense(c), Role.Sense, model.Sense[c].Part, leg.Sense, ve, ve / leg.Sense) { Count = leg.Count });
        if (model.Averaging[c] is { } averaging)
        {
            double i = Math.Abs(point.AveragingCurrents[g]);
            resistors.Add(new ResistorPoint(Slots.Averaging(c), Role.Averaging, averaging.Part, leg.Averaging, i * leg.Averaging, i) { Count = leg.Count });
        }
    }

    private static void AddShared(List<ResistorPoint> resistors, ChannelModel model, SinkCircuit circuit, OperatingPoint point)
    {
        double feed = Math.Abs(point.FeedCurrent);
        resistors.Add(new ResistorPoint(model.Slots.Feed, Role.Feed, model.Feed.Part, circuit.Feed, feed * circuit.Feed, feed));
        if (model.PullDown is { } pullDown)
        {
            double node = circuit.PullDownAt == PullDownAt.Base ? point.BaseVoltage : point.BaseVoltage + (point.FeedCurrent * circuit.Feed);
            double volts = Math.Abs(node);
            resistors.Add(new ResistorPoint(model.Slots.PullDown, Role.PullDown, pullDown.Part, circuit.PullDown, volts, volts / circuit.PullDown));
        }
    }
}
