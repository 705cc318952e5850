using System.Globalization;
using PartCheck.Bills;
using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Reports;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck;

/// <content>Remarks that no rule judges.</content>
public static partial class CheckRun
{
    private sealed partial class BoardCheck
    {
        /// <summary>A part number that the table does not have is looked for by its near misses: suggested, never taken.</summary>
        private static IEnumerable<Advice> MistypedAdvice(Bill bill, PartTable parts, IReadOnlyList<Channel> channels)
        {
            HashSet<string> serving = ElementReference.WithPackages(channels.SelectMany(c => c.References));
            foreach (BillLine line in bill.Lines.Where(l => l.PartNumber is { } number && parts.Find(number).Count == 0 && !parts.Unread.Contains(number) && l.References.Any(serving.Contains)))
            {
                if (NearMisses.Of(line.PartNumber!, parts.Parts.Select(p => p.PartNumber)) is { Count: > 0 } near)
                {
                    yield return new Advice(null, line.References[0], $"The part table has no row {line.PartNumber}; is {string.Join(" or ", near)} meant?");
                }
            }
        }

        /// <summary>Remarks on parts and circuits that no rule judges.</summary>
        private static IEnumerable<Advice> CircuitAdvice(IReadOnlyList<Channel> channels)
        {
            List<string> floating = [.. channels.Where(c => c.Readings.Count > 0 && c.Readings[0].PullDown is null).Select(c => c.Name)];
            if (floating.Count > 0)
            {
                yield return new Advice(null, null, $"{string.Join(", ", floating)}: no pull-down; while the pin floats at reset nothing holds the channel off.");
            }

            foreach (BoundChannel channel in channels.Where(c => c.Readings.Count > 0).Select(c => c.Readings[0]))
            {
                int load = channel.Conditions.Leds * channel.Conditions.Strings;
                if (channel.Leds.Count > 0 && channel.Leds.Count < load)
                {
                    yield return new Advice(
                        channel.Name, null, string.Create(CultureInfo.InvariantCulture, $"LED names {channel.Leds.Count} of the load's {load} LEDs; the others are not judged."));
                }
            }

            IEnumerable<Part> used = channels.SelectMany(c => c.Readings).SelectMany(r => r.Placements).Select(p => p.Part).Distinct()
                .OrderBy(p => p.PartNumber, StringComparer.Ordinal);
            foreach (Part part in used)
            {
                if (part.Lifecycle is { } lifecycle && !lifecycle.Equals("active", StringComparison.OrdinalIgnoreCase))
                {
                    yield return new Advice(null, null, $"{part.PartNumber}: lifecycle \"{lifecycle}\".");
                }

                if (part.Stock is 0)
                {
                    yield return new Advice(null, null, $"{part.PartNumber}: none in stock.");
                }

                if (part is ResistorPart { Resistance.Value.Ohms: > 0 and var ohms }
                    && !PreferredValues.Contains(PreferredSeries.E24, ohms) && !PreferredValues.Contains(PreferredSeries.E96, ohms))
                {
                    yield return new Advice(null, null, $"{part.PartNumber}: {EngineeringNotation.Format(ohms, "ohm")} is neither an E24 nor an E96 value.");
                }
            }
        }

        /// <summary>Remarks on what heat and a single fault would do, of each channel's worst reading.</summary>
        private IEnumerable<Advice> FaultAdvice(IReadOnlyList<JudgedChannel> judged, CancellationToken cancel)
        {
            foreach (JudgedChannel channel in judged.Where(j => j.Readings.Count > 0))
            {
                int hot = channel.Readings.FindIndex(r => HotNeighbour.Text(channel.Models[channel.Readings.IndexOf(r)], r) is not null);
                if (hot >= 0)
                {
                    yield return new Advice(
                        channel.Channel.Name, channel.Models[hot].Channel.Control.Reference, HotNeighbour.Text(channel.Models[hot], channel.Readings[hot])!);
                }

                double supply = channel.Models[0].Channel.Conditions.Supply.Max.Volts;
                string shorted = channel.Models
                    .Select(m => ShortedLoad.Judge(m.Channel, Variants, new PinSource(m.Channel.Logic), request.Threads, cancel))
                    .OrderByDescending(j => j.Count(s => s.Stress.Verdict == Verdict.Nonconforming))
                    .ThenByDescending(j => j.Max(s => s.Stress.Ratio ?? 0))
                    .Select(j => ShortedLoad.Text(supply, j)).First();
                yield return new Advice(channel.Channel.Name, null, shorted);
            }
        }
    }
}
