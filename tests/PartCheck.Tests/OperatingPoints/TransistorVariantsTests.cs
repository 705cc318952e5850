using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>The devices of a row stand where the row's own points put them: expected values are the row's.</summary>
public class TransistorVariantsTests
{
    private static readonly TransistorVariants Given = new(SampleChannel.Transistor());

    [Theory]
    [InlineData(Extreme.Min, 0.62)]
    [InlineData(Extreme.Max, 0.70)]
    public void EachEndOfTheVbeWindowIsMetAtItsTestPoint(Extreme vbe, double volts)
    {
        foreach (Extreme hfe in new[] { Extreme.Min, Extreme.Max })
        {
            DatasheetPoint point = DatasheetPoint.Solve(Given.At(new TransistorCorner(vbe, hfe)), 10e-3, 5);
            Assert.Equal(volts, point.Vbe, 6);
        }
    }

    [Theory]
    [InlineData(Extreme.Min, 1e-3, 100)]
    [InlineData(Extreme.Min, 10e-3, 120)]
    [InlineData(Extreme.Min, 50e-3, 80)]
    [InlineData(Extreme.Max, 1e-3, 300)]
    [InlineData(Extreme.Max, 10e-3, 360)]
    [InlineData(Extreme.Min, 150e-3, 80)]
    [InlineData(Extreme.Min, 0.4e-3, 100)]
    public void TheGainIsTheTablesAtItsPointsAndHeldOutside(Extreme hfe, double ic, double gain)
    {
        DatasheetPoint point = DatasheetPoint.Solve(Given.At(new TransistorCorner(Extreme.Min, hfe)), ic, 5);
        Assert.InRange(point.Gain / gain, 0.995, 1.005);
    }

    // Row: hFE at least 60 at 10 mA and -40 degC.
    [Fact]
    public void TheColdMinimumIsMetInTheCold()
    {
        BipolarDevice device = Given.At(new TransistorCorner(Extreme.Min, Extreme.Min));
        double low = 0.5;
        double high = 1.0;
        BipolarCurrents q = default;
        for (int i = 0; i < 60; i++)
        {
            double vbe = (low + high) / 2;
            device.At(233.15).Evaluate(vbe, vbe - 5, out q);
            (low, high) = q.Ic < 10e-3 ? (vbe, high) : (low, vbe);
        }

        Assert.InRange(q.Ic / q.Ib, 59.4, 60.6);
    }

    // The slash sheets' minima fall from 100 to 35 between 25 and -55 degC (MIL-PRF-19500/251 and /255): the assumed 3.4.
    [Fact]
    public void WithoutAColdPointTheMinimumFallsAsTheSlashSheetsDo()
    {
        TransistorVariants variants = new(SampleChannel.Transistor() with { HfeCold = null });
        BipolarDevice device = variants.At(new TransistorCorner(Extreme.Min, Extreme.Min));
        device.At(298.15).Evaluate(0.65, -4.35, out BipolarCurrents warm);
        device.At(218.15).Evaluate(0.80, -4.20, out BipolarCurrents cold);
        Assert.InRange(cold.Ic / cold.Ib / (warm.Ic / warm.Ib), 0.30, 0.40);
        Assert.Contains(variants.Assumed, a => a.What == "hFE against temperature");
    }

    [Fact]
    public void AMissingMaximumGainIsTheBoundWithoutBaseCurrentAndIsListed()
    {
        Transistor part = SampleChannel.Transistor();
        TransistorVariants variants = new(part with
        {
            Hfe = new Cited<IReadOnlyList<HfePoint>>([new HfePoint(Current.FromAmperes(10e-3), 120, null)], "parts.csv!K2"),
        });
        variants.At(new TransistorCorner(Extreme.Min, Extreme.Max)).At(298.15).Evaluate(0.65, -4, out BipolarCurrents q);
        Assert.InRange(Math.Abs(q.Ib), 0, 1e-11);
        Assert.True(q.Ic > 1e-3);
        Assert.Contains(variants.Assumed, a => a.What == "hFE maximum");
    }

    [Fact]
    public void ATypicalVbeAloneSpreadsByFiftyMillivoltsAndIsListed()
    {
        TransistorVariants variants = new(SampleChannel.Transistor() with
        {
            Vbe = new Cited<VbeWindow>(
                new VbeWindow(null, Voltage.FromVolts(0.65), null, Current.FromAmperes(2e-3), Voltage.FromVolts(5)), "parts.csv!K2"),
        });
        Assert.Equal(0.60, DatasheetPoint.Solve(variants.At(new TransistorCorner(Extreme.Min, Extreme.Min)), 2e-3, 5).Vbe, 6);
        Assert.Equal(0.70, DatasheetPoint.Solve(variants.At(new TransistorCorner(Extreme.Max, Extreme.Min)), 2e-3, 5).Vbe, 6);
        Assert.Contains(variants.Assumed, a => a is { What: "VBE window", Value: "0.600..0.700 V at 2 mA" });
    }

    [Fact]
    public void ACardOutsideThePartsWindowsIsFoundOut()
    {
        // IS 4 nA for a small-signal type: VBE far below any window.
        BipolarParameters card = new() { Is = 4e-9, Bf = 200, Vaf = 80 };
        TransistorVariants variants = new(SampleChannel.Transistor() with
        {
            Card = new Cited<ModelCard>(new ModelCard("wrong", card, [], []), "parts.csv!Z2"),
        });
        Assert.NotNull(variants.CardFault);
        Assert.Contains("VBE at 10 mA", variants.CardFault, StringComparison.Ordinal);
    }

    [Fact]
    public void ACardInsideThePartsWindowsIsTheNominalDeviceUntouched()
    {
        BipolarParameters card = new() { Is = 9e-14, Bf = 200, Vaf = 80 };
        TransistorVariants variants = new(SampleChannel.Transistor() with
        {
            Card = new Cited<ModelCard>(new ModelCard("right", card, [], []), "parts.csv!Z2"),
        });
        Assert.Null(variants.CardFault);
        Assert.Same(card, variants.Nominal.Parameters);
        Assert.Null(variants.Nominal.Gain);
    }
}
