using System.Reflection;
using Xunit;

namespace PartCheck.Cli.Tests;

/// <summary>Trouble: which exit code wins, and that nothing is left half-written.</summary>
public class TroubleTests
{
    [Theory]
    [InlineData("--bogus", "There is no option --bogus")]
    [InlineData("--out ", "--out needs a value.")]
    [InlineData("--parts ", "--parts needs a value.")]
    [InlineData("--out=", "Required argument missing for option: '--out'")]
    [InlineData("--out=a --out=b", "expects a single argument")]
    [InlineData("--parts --replace", "--parts needs a value, not --replace")]
    [InlineData("--format=xml --bogus", "There is no option --bogus")]
    public async Task AWrongOptionIsOneLineAndNoBoard(string options, string text)
    {
        using BoardFolder board = new();
        Run run = await board.Check(options.Split(' '));
        Assert.Equal(64, run.Code);
        Assert.Empty(run.Output);
        Assert.Contains(text, run.Error, StringComparison.Ordinal);
        Assert.Equal(run.Error.Length - 1, run.Error.IndexOf('\n', StringComparison.Ordinal));
    }

    [Fact]
    public async Task AnUnknownCommandIsOneLine()
    {
        Run run = await Run.Of("chek");
        Assert.Equal(64, run.Code);
        Assert.Equal("partcheck: Unrecognized command or argument 'chek'.\n", run.Error);
    }

    [Fact]
    public async Task UsageComesBeforeEverythingElse()
    {
        using BoardFolder board = new(channels: BoardFolder.Channels.Replace("11.4", "many", StringComparison.Ordinal));
        Assert.Equal(64, (await board.Check("--derating", "no-such", "--out", board.At("no/such/file"), "--parts", "nowhere.csv")).Code);
    }

    [Fact]
    public async Task CannotCreateComesBeforeNoInputAndIsToldWithoutARun()
    {
        using BoardFolder board = new();
        Run run = await board.Check("--out", board.At("no/such/file"), "--parts", board.At("nowhere.csv"));
        Assert.Equal(73, run.Code);
        Assert.Empty(run.Output);
    }

    [Fact]
    public async Task NoInputComesBeforeDataAndDataBeforeTheVerdict()
    {
        using BoardFolder wrong = new(channels: BoardFolder.Channels.Replace("11.4", "many", StringComparison.Ordinal));
        using BoardFolder broken = new(bill: BoardFolder.Bill.Replace("R1,RK-33,1", "R1,RK-33,2", StringComparison.Ordinal));
        Assert.Equal(1, (await broken.Check()).Code);
        Assert.Equal(65, (await Run.Of("check", broken.Folder, wrong.Folder)).Code);
        Assert.Equal(66, (await Run.Of("check", broken.Folder, wrong.Folder, "no-such-board.xlsx")).Code);
    }

    [Fact]
    public async Task NonconformingComesBeforeNotVerifiedBeforeConforming()
    {
        using BoardFolder good = new();
        using BoardFolder open = new(parts: BoardFolder.Parts.Replace(",0.3,50,,,,", ",,,,,,", StringComparison.Ordinal));
        using BoardFolder broken = new(bill: BoardFolder.Bill.Replace("R1,RK-33,1", "R1,RK-33,2", StringComparison.Ordinal));
        Assert.Equal(0, (await Run.Of("check", good.Folder)).Code);
        Assert.Equal(2, (await Run.Of("check", good.Folder, open.Folder)).Code);
        Assert.Equal(1, (await Run.Of("check", good.Folder, open.Folder, broken.Folder)).Code);
    }

    [Fact]
    public async Task StandardOutputThatIsFullIsAWriteFailureWhateverTheVerdict()
    {
        using BoardFolder board = new();
        foreach (string[] args in new[] { ["check", board.Folder], ["check", "no-such-board.xlsx"], new[] { "--help" } })
        {
            using StringWriter error = new() { NewLine = "\n" };
            using StreamWriter output = new(new FullStream()) { AutoFlush = false };
            Assert.Equal(74, await CommandLine.RunAsync(args, output, error, false, TestContext.Current.CancellationToken));
            Assert.Equal("partcheck: standard output could not be written.\n", error.ToString());
        }
    }

    [Fact]
    public async Task AnInterruptedRunLeavesNoFile()
    {
        using BoardFolder board = new();
        using CancellationTokenSource cancel = new();
        await cancel.CancelAsync();
        using StringWriter output = new();
        using StringWriter error = new();
        int code = await CommandLine.RunAsync(["check", board.Folder, "--out", board.At("report.txt")], output, error, false, cancel.Token);
        Assert.Equal(130, code);
        Assert.Empty(output.ToString());
        Assert.Equal(["bom.csv", "channels.csv", "parts.csv", "pins.csv"], Directory.GetFiles(board.Folder).Select(Path.GetFileName).Order(StringComparer.Ordinal));
    }

    [Fact]
    public async Task AFileIsUtf8WithoutMarkAndWithLineFeedsAlone()
    {
        using BoardFolder board = new(channels: BoardFolder.Channels.Replace("CH1", "Gr\u00FCn", StringComparison.Ordinal));
        Assert.Equal(0, (await board.Check("--out", board.At("report.txt"))).Code);
        byte[] bytes = await File.ReadAllBytesAsync(board.At("report.txt"), TestContext.Current.CancellationToken);
        Assert.NotEqual(0xEF, bytes[0]);
        Assert.DoesNotContain((byte)'\r', bytes);
        Assert.True(bytes.AsSpan().IndexOf("Gr\u00FCn"u8) > 0);
        Assert.Equal((byte)'\n', bytes[^1]);
    }

    [Fact]
    public void TheVersionIsANumberAlone() =>
        Assert.Matches(@"^\d+\.\d+\.\d+$", typeof(CommandLine).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion);

    /// <summary>A device with no space left.</summary>
    private sealed class FullStream : MemoryStream
    {
        public override void Write(byte[] buffer, int offset, int count) => throw new IOException("No space left on device");

        public override void Write(ReadOnlySpan<byte> buffer) => throw new IOException("No space left on device");

        public override ValueTask WriteAsync(ReadOnlyMemory<byte> buffer, CancellationToken cancellationToken = default) =>
            throw new IOException("No space left on device");
    }
}
