using BenchmarkDotNet.Attributes;
using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Rules;
using PartCheck.Tests.OperatingPoints;

namespace PartCheck.Benchmarks.OperatingPoints;

/// <summary>Time of a channel's whole worst case, every rule judged: all corners one by one and side by side; one core, and two cores over many channels.</summary>
[MemoryDiagnoser]
public class ChannelBenchmarks
{
    private ChannelJudge judge = null!;
    private ChannelModel model = null!;
    private PinSource pin = null!;

    /// <summary>Legs of the channel.</summary>
    [Params(1, 2)]
    public int Legs { get; set; }

    /// <summary>Builds the channel.</summary>
    [GlobalSetup]
    public void Setup()
    {
        BoundChannel channel = SampleChannel.Channel(Legs, feed: Legs == 1 ? 4700 : 1500);
        model = new ChannelModel(channel, p => new TransistorVariants(p));
        pin = new PinSource(channel.Logic);
        judge = new ChannelJudge(model, DeratingLibrary.Named("workshop")!);
    }

    /// <summary>Every corner solved by the scalar solver, not judged.</summary>
    [Benchmark]
    public int OneByOneUnjudged() => WorstCase.EnumerateOneByOne(model, pin, 1.5, 1, () => 0, (_, _) => { }, CancellationToken.None).Count;

    /// <summary>Every corner solved side by side, not judged.</summary>
    [Benchmark]
    public int SideBySideUnjudged() => WorstCase.Enumerate(model, pin, 1.5, 1, () => 0, (_, _) => { }, CancellationToken.None).Count;

    /// <summary>Every corner solved side by side and judged.</summary>
    [Benchmark]
    public int Enumerated() => judge.Judge(pin, 1, CancellationToken.None).Corners;

    /// <summary>Four channels side by side, as many threads as there are cores.</summary>
    [Benchmark(OperationsPerInvoke = 4)]
    public int FourChannelsOnAllCores()
    {
        int corners = 0;
        Parallel.For(0, 4, _ => Interlocked.Add(ref corners, judge.Judge(pin, 1, CancellationToken.None).Corners));
        return corners;
    }
}
