using PartCheck.Channels;
using Xunit;

namespace PartCheck.Tests.Channels;

public sealed class ChannelReaderTests
{
    private readonly TypedBoard board = new();

    [Fact]
    public void BlankCellsHaveTheirMeaning()
    {
        BoundChannel channel = Assert.Single(Assert.Single(board.Bind()).Readings);
        ChannelConditions c = channel.Conditions;
        Assert.Empty(board.Complaints);
        Assert.Equal(12.6, c.SupplyPeak.Volts);
        Assert.Equal(0.020, c.CurrentNominal.Amperes, 12);
        Assert.Equal((1.0, 0.0), (c.Duty, c.LoadSlope.Ohms));
        Assert.Null(c.Frequency);
        Assert.Null(c.OffCurrentMax);
        Assert.Null(c.SharingMax);
        Assert.Null(channel.Pin);
        Assert.Null(channel.PullDown);
        Assert.Equal(273.15, c.Ambient.Min.Kelvins, 9);
    }

    // 9.5 V / 3.3 V = 2.9, 9.9 V / 3.3 V = 3, 10 V / 3.3 V = 3.03: rounded up.
    [Theory]
    [InlineData("9.5", 3)]
    [InlineData("10", 4)]
    public void LedsAreCountedFromTheDropAndListedAsAssumed(string drop, int leds)
    {
        board.Row.Remove("LEDs");
        board.Row["Load drop max"] = drop;
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(leds, channel.Readings[0].Conditions.Leds);
        Assert.Contains(new Assumption("LEDs", "CH1", leds == 3 ? "3" : "4"), channel.Assumed);
    }

    // Six LEDs in two strings: three in series.
    [Fact]
    public void LedsOfTheLoadAreNamedAndCounted()
    {
        board.Row.Remove("LEDs");
        board.Row["LED"] = "D1-D6";
        board.Row["Strings"] = "2";
        board.Row["String share max"] = "1.2";
        board.Bill.Add("D1-D6|LW-3");
        board.Parts.Add("LW-3|led|Tarnwood");
        Channel channel = Assert.Single(board.Bind());
        BoundChannel reading = Assert.Single(channel.Readings);
        Assert.Empty(board.Complaints);
        Assert.Equal(["D1", "D2", "D3", "D4", "D5", "D6"], reading.Leds.Select(l => l.Reference));
        Assert.Equal((3, 2, 1.2), (reading.Conditions.Leds, reading.Conditions.Strings, reading.Conditions.StringShareMax));
        Assert.Contains(new Assumption("LEDs", "CH1", "3"), channel.Assumed);
        Assert.Contains("D6", channel.References);
    }

    [Fact]
    public void LedsThatMakeNoEqualStringsAreTold()
    {
        board.Row["LED"] = "D1-D5";
        board.Row["Strings"] = "2";
        Assert.Empty(Assert.Single(board.Bind()).Readings);
        Assert.Contains("5 LEDs do not make 2 equal strings.", board.Only(), StringComparison.Ordinal);
    }

    // Three in series, two strings: six at most.
    [Fact]
    public void MoreLedsThanTheLoadHasAreTold()
    {
        board.Row["LEDs"] = "3";
        board.Row["LED"] = "D1-D8";
        board.Row["Strings"] = "2";
        Assert.Empty(Assert.Single(board.Bind()).Readings);
        Assert.Contains("LED names 8 LEDs, and LEDs times Strings is 6.", board.Only(), StringComparison.Ordinal);
    }

    [Fact]
    public void APullDownWithoutItsPlaceSitsAtTheBaseAssumed()
    {
        board.Row["Pull-down"] = "R8";
        Channel channel = Assert.Single(board.Bind());
        Assert.Equal(PullDownAt.Base, channel.Readings[0].PullDownAt);
        Assert.Contains(new Assumption("Pull-down at", "CH1", "base"), channel.Assumed);
    }

    [Theory]
    [InlineData("Load slope", "900", "The slope alone would drop more than the whole load")]
    [InlineData("Current nominal", "30mA", "Current nominal lies outside")]
    [InlineData("Supply peak", "12", "Supply peak is below Supply max.")]
    [InlineData("Duty max", "0%", "A duty of 0")]
    [InlineData("Duty max", "0.5", "with a % sign")]
    [InlineData("Duty max", "120%", "P2")]
    [InlineData("Sharing max", "1", "it is above 1")]
    [InlineData("Sharing max", "0.9", "it is above 1")]
    [InlineData("Frequency", "0", "P2")]
    [InlineData("Frequency", "1 s", "unit of another kind")]
    [InlineData("Off current max", "-1uA", "P2")]
    [InlineData("Current min", "28mA", "Current min is not below Current max.")]
    [InlineData("Current max", "28", "most likely in another unit")]
    [InlineData("Ambient max", "300", "K2")]
    [InlineData("Ambient min", "-120", "J2")]
    [InlineData("LEDs", "2.5", "The number of LEDs is a whole number.")]
    [InlineData("LEDs", "-1", "F2")]
    [InlineData("Supply min", "-11", "B2")]
    [InlineData("Supply min", "0", "B2")]
    [InlineData("Supply min", "1e400", "B2")]
    [InlineData("Pull-down at", "collector", "neither that the pull-down sits")]
    [InlineData("Logic", "P9", "known are P5, P3")]
    [InlineData("Logic", "", "names no row of the pin table")]
    [InlineData("Control", "Q2, Q3", "A channel has one control, not 2 of them.")]
    [InlineData("Feed", "R2, R8", "A channel has one feed, not 2 of them.")]
    [InlineData("Pass", "Q1-Q20000", "longer than 10000")]
    [InlineData("Averaging", "-", "senses no leg")]
    [InlineData("Pass", "-", "The channel has no pass.")]
    [InlineData("Control", "-", "The channel has no control.")]
    [InlineData("Sense", "R1, -", "only averaging may leave a leg out")]
    [InlineData("LED", "6", "\"6\" is no reference: LED names the load's LEDs on the bill")]
    [InlineData("LED", "D1, -", "only averaging may leave a leg out")]
    [InlineData("Strings", "1.5", "The number of strings is a whole number.")]
    [InlineData("Strings", "0", "P2")]
    [InlineData("String share max", "0.9", "P2")]
    public void AMistakeIsToldWithItsCellAndCostsThatChannelAlone(string column, string text, string told)
    {
        string good = board.Row.GetValueOrDefault(column) ?? string.Empty;
        board.Row[column] = text;
        board.Further.Add([("Channel", "GOOD"), (column, good)]);
        IReadOnlyList<Channel> channels = board.Bind();
        Assert.Contains(board.Complaints, c => (c.Cell + " " + c.Text).Contains(told, StringComparison.Ordinal));
        Assert.All(board.Complaints, c => Assert.Equal("CH1", c.Channel));
        Assert.Equal(["CH1", "GOOD"], channels.Select(c => c.Name));
        Assert.Empty(channels[0].Readings);
        Assert.Contains("a channel row without complaints", channels[0].Missing);
        Assert.Single(channels[1].Readings);
    }

    [Fact]
    public void ADashForThePullDownMeansNone()
    {
        board.Row["Pull-down"] = "-";
        Assert.Null(Assert.Single(Assert.Single(board.Bind()).Readings).PullDown);
        Assert.Empty(board.Complaints);
    }

    [Fact]
    public void AChannelTwiceIsToldAndNeitherRowIsChosen()
    {
        board.Further.Add([("Channel", "ch1"), ("Current max", "40mA")]);
        Assert.Empty(Assert.Single(board.Bind()).Readings);
        Assert.Equal("A3 The channel ch1 stands in the sheet twice; the other row is c.csv!A2.", board.Only());
    }

    [Fact]
    public void OnePinOfTwoKindsLosesBothChannels()
    {
        board.Row["Pin"] = "PWM";
        board.Further.Add([("Channel", "CH2"), ("Logic", "P3")]);
        Assert.All(board.Bind(), c => Assert.Empty(c.Readings));
        Assert.Contains("The pin PWM is P3 here and P5 in channel CH1.", board.Only(), StringComparison.Ordinal);
    }

    [Fact]
    public void ASlopeBelowTheWholeDropIsFine()
    {
        // 20 mA x 400 ohm = 8 V, below 8.5 V.
        board.Row["Load slope"] = "400";
        Assert.Single(Assert.Single(board.Bind()).Readings);
    }
}
