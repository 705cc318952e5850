using CsCheck;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Rules;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>Points inside the box, at random: none is worse than the worst corner.</summary>
public class InteriorTests
{
    private static readonly BoundChannel Channel = SampleChannel.Channel(1, feed: 4700);
    private static readonly ChannelModel Model = new(Channel, p => new TransistorVariants(p));
    private static readonly PinSource Pin = new(Channel.Logic);
    private static readonly ChannelBox Box = new(Model, Pin, ChannelState.On, -1);

    [Fact]
    public void NoInteriorPointBeatsTheCorners()
    {
        ReadingJudgement judged = new ChannelJudge(Model, DeratingLibrary.Named("ratings")!).Judge(Pin, 0, TestContext.Current.CancellationToken);
        double power = Ratio(judged, "power", "Q1");
        double junction = Ratio(judged, "junction", "Q1");
        Assert.Equal(0, judged.NotSolved);

        Gen.Select(Gen.Int[0, Box.Count - 1], Gen.Double[0, 1], Gen.Double[0, 1], Gen.Double[0, 1], Gen.Double[0, 1], Gen.Double[0, 1], Gen.Double[0, 1])
            .Sample(
                (corner, supply, drop, pin, ambient, sense, feed) =>
                {
                    SinkCircuit c = Box.At(corner).Circuit;
                    double kelvins = Between(263.15, 328.15, ambient);
                    double heat = c.ControlHeat.RthJa;
                    double weak = Pin.WeakResistance * (1 - pin);
                    SinkCircuit inside = c with
                    {
                        Supply = Between(22.8, 25.2, supply),
                        Load = LoadElement.FromDrop(Between(16, 18, drop), 0.02, 0, 6),
                        PinVoltage = Between(Pin.WeakVoltage, Pin.StrongVoltage, pin),
                        PinResistance = weak,
                        Feed = Between(Model.Feed.At(Extreme.Min, kelvins), Model.Feed.At(Extreme.Max, kelvins), feed),
                        ControlHeat = c.ControlHeat with { Base = kelvins },
                        Legs = [c.Legs[0] with
                        {
                            Sense = Between(Model.Sense[0].At(Extreme.Min, kelvins), Model.Sense[0].At(Extreme.Max, kelvins), sense),
                            Heat = c.Legs[0].Heat with { Base = kelvins },
                        }],
                    };
                    OperatingPoint? p = new SinkSolver().Solve(inside);
                    Assert.NotNull(p);
                    Assert.InRange(p.LoadCurrent, judged.LoadMin * (1 - 1e-9), judged.LoadMax * (1 + 1e-9));

                    // The sample: 0.35 W up to 25 degC, then to zero at 150 degC; 300 K/W.
                    double rated = Math.Min(0.35 * Math.Min(1, (423.15 - kelvins) / 125), (423.15 - kelvins) / 300);
                    Assert.InRange(p.Legs[0].Power / rated, 0, power * (1 + 1e-9));
                    Assert.InRange((p.Legs[0].Tj - kelvins) / (423.15 - kelvins), 0, heat > 0 ? junction * (1 + 1e-9) : 1e-9);
                },
                iter: 10_000);
    }

    private static double Ratio(ReadingJudgement judged, string rule, string reference) =>
        judged.Findings.Single(f => f.Rule == rule && f.Reference == reference).StressRatio!.Value;

    private static double Between(double low, double high, double share) => low + ((high - low) * share);
}
