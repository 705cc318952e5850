using PartCheck.Channels;
using PartCheck.Devices;
using PartCheck.OperatingPoints;
using PartCheck.Tests.Reference;
using Xunit;

namespace PartCheck.Tests.OperatingPoints;

/// <summary>
/// Corners of whole channels, windows and self-heating included, written out as plain cards and solved by ngspice: the VBE shift as IS and
/// ISE, the gain factor as BF and ISE at the leg's own current, the gain's temperature exponent as XTB, the junctions at the temperatures
/// that the corner was solved with.
/// </summary>
public class CornersInNgspiceTests
{
    [Theory]
    [InlineData(1, 4700)]
    [InlineData(3, 1500)]
    public void CornersAgreeToATenthOfAPercent(int legs, double feed)
    {
        Assert.SkipUnless(Ngspice.Absence is null, Ngspice.Absence ?? string.Empty);
        ChannelModel model = new(SampleChannel.Channel(legs, feed: feed), p => new TransistorVariants(p));
        PinSource pin = new(model.Channel.Logic);
        int compared = 0;
        foreach (ChannelBox box in WorstCase.Boxes(model, pin))
        {
            // A stride that is prime to every dimension meets all ends.
            for (int i = 7; i < box.Count; i += (box.Count / 12) | 1)
            {
                BoxCorner corner = box.At(i);
                OperatingPoint? p = new SinkSolver().Solve(corner.Circuit);
                Assert.NotNull(p);
                ReferenceResult? expected = Ngspice.Solve(Written(corner, p, box.State));
                Assert.NotNull(expected);
                Close(expected.LoadCurrent, p.LoadCurrent, 1e-9);
                Close(expected.PinCurrent, p.PinCurrent, 1e-9);
                Close(expected.BaseVoltage, p.BaseVoltage, 10e-6);
                Close(expected.ControlIc, p.Control.Ic, 1e-9);
                Close(expected.Ic[0], p.Legs[0].Ic, 1e-9);
                Close(expected.Ib[0], p.Legs[0].Ib, 1e-9);
                compared++;
            }
        }

        Assert.InRange(compared, 20, 60);
    }

    private static ReferenceCircuit Written(in BoxCorner corner, OperatingPoint p, ChannelState state)
    {
        SinkCircuit c = corner.Circuit;
        List<ReferenceLeg> legs = [];
        for (int g = 0; g < c.Legs.Count; g++)
        {
            LegGroup leg = c.Legs[g];
            ReferenceTransistor pass = Plain(leg.Pass, p.Legs[g]);
            legs.AddRange(Enumerable.Repeat(new ReferenceLeg(pass, leg.Sense, leg.Averaging, leg.Sensed), leg.Count));
        }

        // The load at the corner's drop: six LEDs, n = 12 (SampleChannel), IS so that the drop holds at the nominal current.
        double nominal = 0.02 * c.Legs.Sum(l => l.Count);
        double scale = 12 * 1.380649e-23 * 298.15 / 1.602176634e-19;
        return new ReferenceCircuit
        {
            Name = $"corner of {legs.Count}",
            Unfed = state == ChannelState.Unfed,
            PinVoltage = c.PinVoltage,
            PinResistance = c.PinResistance,
            Feed = c.Feed,
            PullDown = c.PullDown,
            PullDownAt = c.PullDownAt,
            Supply = c.Supply,
            LoadEmission = 12,
            LoadSaturation = nominal / (Math.Exp(corner.Corner.LoadDrop / scale) - 1),
            LoadSeries = 0,
            Control = Plain(c.Control, p.Control),
            Legs = legs,
        };
    }

    /// <summary>A corner's device at one operating point as a card that any SPICE reads (TNOM 25 degC, as the fit makes it).</summary>
    private static ReferenceTransistor Plain(BipolarDevice device, in SolvedTransistor at)
    {
        BipolarParameters card = device.Parameters;
        Assert.Equal(298.15, card.Tnom, 9);
        double shift = device.At(298.15).SaturationCurrent / card.Is;
        double factor = device.Gain is { } gain ? gain.At(at.Ic, out _) : 1;
        return new ReferenceTransistor(
            card with
            {
                Is = card.Is * shift,
                Bf = card.Bf / factor,
                Ise = card.Ise * Math.Pow(shift, card.Nf / card.Ne) * factor,
                Xtb = at.Tj < 298.15 ? device.XtbCold : device.XtbHot,

                // The reverse gain follows the card's own exponent, 0 here: written at the corner's.
                Br = card.Br * Math.Pow(at.Tj / 298.15, card.Xtb - (at.Tj < 298.15 ? device.XtbCold : device.XtbHot)),
            },
            at.Tj - 273.15);
    }

    private static void Close(double expected, double actual, double floor) =>
        Assert.InRange(Math.Abs(actual - expected), 0, Math.Max(1e-3 * Math.Abs(expected), floor));
}
