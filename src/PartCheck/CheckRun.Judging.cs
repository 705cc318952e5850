using System.Globalization;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Rules;
using PartCheck.Sheets;

namespace PartCheck;

/// <content>Channels judged: each by itself first, then with what others take from its pin and put into its packages.</content>
public static partial class CheckRun
{
    private sealed partial class BoardCheck
    {
        private List<JudgedChannel> JudgeChannels(IReadOnlyList<Channel> channels, DeratingTable runDerating, CancellationToken cancel)
        {
            List<JudgedChannel> judged = [.. channels.Select(c => new JudgedChannel(c, TableOf(c, runDerating)))];
            foreach (JudgedChannel channel in judged)
            {
                foreach (BoundChannel reading in channel.Channel.Readings)
                {
                    ChannelModel model = new(reading, Variants);
                    if (model.Pass.Append(model.Control).Distinct().FirstOrDefault(v => v.CardFault is not null) is { } wrong)
                    {
                        channel.CardFault = wrong;
                        continue;
                    }

                    channel.Models.Add(model);
                }
            }

            foreach (IGrouping<TransistorVariants, JudgedChannel> fault in judged.Where(j => j.CardFault is not null).GroupBy(j => j.CardFault!))
            {
                Transistor part = fault.Key.Part;
                complaints.Add(Complaint.At(
                    part.Card!.Cell, "Model", part.Card.Value.Name, "this part's own card",
                    $"The model card of {part.PartNumber} is another part's, or wrong: {fault.Key.CardFault}.") with
                { Channel = fault.First().Channel.Name });
                foreach (JudgedChannel channel in fault)
                {
                    channel.Models.Clear();
                }
            }

            // Feeds on one pin lower each other's level, elements of one package warm each other: first each channel alone, then with
            // what the others draw and dissipate.
            List<IGrouping<string, JudgedChannel>> pins = [.. judged.Where(j => j.Models.Count > 0).GroupBy(PinKey, StringComparer.OrdinalIgnoreCase)];
            Dictionary<string, double> powers = new(StringComparer.OrdinalIgnoreCase);
            foreach (JudgedChannel feed in pins.SelectMany(p => p).Where(f => f.HasNeighbours || pins.Any(p => p.Count() > 1 && p.Contains(f))))
            {
                List<ReadingJudgement> alone = [.. feed.Models.Select(m => Judgement(feed, m, 0, cancel))];
                feed.AloneCurrent = alone.Max(r => r.PinMax);
                foreach ((string reference, double watts) in alone.SelectMany(r => r.MostPower))
                {
                    powers[reference] = Math.Max(powers.GetValueOrDefault(reference), watts);
                }
            }

            foreach (JudgedChannel feed in judged.Where(j => j.HasNeighbours))
            {
                List<ChannelModel> warmed = [.. feed.Models.Select(m => new ChannelModel(m.Channel, Variants, powers))];
                feed.Models.Clear();
                feed.Models.AddRange(warmed);
                feed.MissingNeighbour = warmed.Select(m => m.Package.Missing).FirstOrDefault(m => m is not null);
            }

            foreach (IGrouping<string, JudgedChannel> pin in pins)
            {
                List<JudgedChannel> feeds = [.. pin];
                foreach (JudgedChannel feed in feeds)
                {
                    double others = feeds.Where(f => f != feed).Sum(f => f.AloneCurrent);
                    feed.Readings.AddRange(feed.Models.Select(m => Measured(feed, m, others, cancel)));
                }
            }

            return judged;
        }

        /// <summary>A reading's judgement with its test limits; what another bill of this run has in common with this one is judged once.</summary>
        private ReadingJudgement Measured(JudgedChannel channel, ChannelModel model, double others, CancellationToken cancel)
        {
            string key = string.Create(CultureInfo.InvariantCulture, $"{others:R} {Identity(model)} {channel.Channel.Name}");
            if (!judgements.TryGetValue(key, out ReadingJudgement? made))
            {
                made = Judgement(channel, model, others, cancel) with
                {
                    TestLimits = TestLimits.Of(model.Channel, Variants, new PinSource(model.Channel.Logic, others), request.Threads, cancel),
                };
                judgements[key] = made;
            }

            return made;
        }

        /// <summary>The lines and part rows of a reading, and what other channels warm its packages with, as one text.</summary>
        private string Identity(ChannelModel model)
        {
            int Of(object thing)
            {
                identities.TryAdd(thing, identities.Count);
                return identities[thing];
            }

            IEnumerable<string> parts = model.Channel.Placements.Select(p => string.Create(CultureInfo.InvariantCulture, $"{p.Role}{p.Leg}:{Of(p.Line)}:{Of(p.Part)}"));
            IEnumerable<string> warmth = Enumerable.Range(0, model.Channel.Legs.Count + 1).Select(d => model.Package.NeighbourPower(d).ToString("R", CultureInfo.InvariantCulture));
            return string.Join(',', parts.Concat(warmth));
        }

        private ReadingJudgement Judgement(JudgedChannel channel, ChannelModel model, double others, CancellationToken cancel) =>
            new ChannelJudge(model, channel.Derating).Judge(new PinSource(model.Channel.Logic, others), request.Threads, cancel);

        private static List<Finding> JudgePins(IReadOnlyList<JudgedChannel> judged, DeratingTable derating)
        {
            List<Finding> findings = [];
            foreach (IGrouping<string, JudgedChannel> pin in judged.Where(j => j.Channel.Readings.Count > 0).GroupBy(PinKey, StringComparer.OrdinalIgnoreCase))
            {
                LogicPin logic = pin.First().Channel.Readings[0].Logic;
                findings.Add(PinCurrentRule.Judge(
                    PinName(pin.First().Channel.Readings[0]), [.. pin.Select(j => PinFeed.Of(j.Channel.Name, j.Readings))], logic, derating) with
                {
                    Mix = [.. pin.Where(j => j.Readings.Count > 0).SelectMany(j => j.Readings.MaxBy(r => r.PinMax)!.Channel.Mix)],
                });
            }

            return findings;
        }

        private static string PinName(BoundChannel channel) => channel.Pin ?? channel.Name;

        private static string PinKey(JudgedChannel judged) =>
            judged.Channel.Readings[0] is { Pin: { } net } ? "net " + net : "own " + judged.Channel.Name;

        private TransistorVariants Variants(Transistor part)
        {
            if (!variants.TryGetValue(part, out TransistorVariants? made))
            {
                made = new TransistorVariants(part);
                variants[part] = made;
            }

            return made;
        }
    }

    /// <summary>A channel on its way through the run.</summary>
    private sealed class JudgedChannel(Channel channel, DeratingTable derating)
    {
        public Channel Channel => channel;

        public DeratingTable Derating => derating;

        public List<ChannelModel> Models { get; } = [];

        public List<ReadingJudgement> Readings { get; } = [];

        public TransistorVariants? CardFault { get; set; }

        public double AloneCurrent { get; set; }

        public bool HasNeighbours => Models.Exists(m => m.Channel.Neighbours.Count > 0);

        public string? MissingNeighbour { get; set; }

        public IReadOnlyList<string> MissingData =>
        [
            .. channel.Missing,
            .. CardFault is null ? (string[])[] : [$"a right model card of {CardFault.Part.PartNumber}"],
            .. MissingNeighbour is null ? (string[])[] : [MissingNeighbour],
            .. derating.Unknown ? (string[])[$"derating table {derating.Name}"] : [],
        ];
    }
}
