using System.Text.Json;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Rules;

namespace PartCheck.Reports;

/// <summary>One channel in JSON: verdict, load current and nominal state.</summary>
internal static class JsonChannel
{
    internal static void Write(Utf8JsonWriter json, ChannelJudgement channel)
    {
        json.Text("channel", channel.Channel);
        json.Text("verdict", VerdictWords.Of(channel.Verdict));
        if (channel.LoadCurrent is { } current)
        {
            json.WriteStartObject("loadCurrent");
            json.Real("min", current.Min);
            json.Real("nominal", current.Nominal);
            json.Real("max", current.Max);
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("loadCurrent");
        }

        if (channel is { Nominal: { Solved: true } nominal, Reading: { } reading })
        {
            json.WriteStartObject("nominal");
            WriteNominal(json, nominal, reading);
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("nominal");
        }

        if (channel.TestLimits is { } limits)
        {
            json.WriteStartObject("testLimits");
            json.Real("supply", limits.Supply);
            json.Real("ambient", TestLimits.Ambient);
            WriteRange(json, "baseVoltage", limits.BaseVoltage);
            WriteRange(json, "senseVoltage", limits.SenseVoltage);
            WriteRange(json, "collectorVoltage", limits.CollectorVoltage);
            WriteRange(json, "loadCurrent", limits.LoadCurrent);
            json.WriteEndObject();
        }
        else
        {
            json.WriteNull("testLimits");
        }

        json.Text("derating", channel.Derating);
        json.Whole("cornersSolved", channel.CornersSolved);
        json.Whole("notSolved", channel.NotSolved);
    }

    private static void WriteRange(Utf8JsonWriter json, string name, ValueRange range)
    {
        json.WriteStartObject(name);
        json.Real("min", range.Min);
        json.Real("max", range.Max);
        json.WriteEndObject();
    }

    private static void WriteNominal(Utf8JsonWriter json, SolvedState nominal, BoundChannel reading)
    {
        List<TransistorPoint> passes = [.. nominal.Transistors.Where(t => t.Role == Role.Pass)];
        List<ResistorPoint> senses = [.. nominal.Resistors.Where(r => r.Role == Role.Sense)];
        if (passes.Count != reading.Legs.Count || senses.Count != reading.Legs.Count)
        {
            throw new InvalidOperationException(
                $"The nominal state of {reading.Name} has {passes.Count} pass transistors and {senses.Count} sense resistors "
                + $"for {reading.Legs.Count} legs; it has one of each for every leg.");
        }

        json.Real("baseVoltage", nominal.BaseVoltage);
        json.Real("controlBaseVoltage", nominal.ControlBaseVoltage);
        json.Real("collectorVoltage", nominal.CollectorVoltage);
        json.Real("pinCurrent", nominal.PinCurrent);
        json.WriteStartArray("legs");
        for (int leg = 0; leg < passes.Count; leg++)
        {
            TransistorPoint pass = passes[leg];
            json.WriteStartObject();
            json.Text("pass", reading.Legs[leg].Pass.Reference);
            json.Real("collectorCurrent", pass.Ic);
            json.Real("baseCurrent", pass.Ib);
            // The sense resistor joins emitter and ground: its voltage is the emitter's.
            json.Real("emitterVoltage", senses[leg].Voltage);
            json.Real("junctionTemperature", pass.Tj);
            json.Real("power", pass.Power);
            json.WriteEndObject();
        }

        json.WriteEndArray();
        TransistorPoint control = nominal.Transistors.Single(t => t.Role == Role.Control);
        json.WriteStartObject("control");
        json.Text("reference", reading.Control.Reference);
        json.Real("collectorCurrent", control.Ic);
        json.Real("baseCurrent", control.Ib);
        json.Real("junctionTemperature", control.Tj);
        json.Real("power", control.Power);
        json.WriteEndObject();
    }
}
