using PartCheck.Channels;
using PartCheck.OperatingPoints;
using PartCheck.Parts;
using PartCheck.Quantities;
using PartCheck.Rules;

namespace PartCheck.Workings;

/// <summary>The room's door: a finding to its working.</summary>
public static class FindingWorking
{
    /// <summary>Writes the derivation of a finding, works it out and holds it to what the solver and the rule said.</summary>
    /// <param name="finding">The finding.</param>
    /// <exception cref="NotReproducedException">The working does not come to the finding's figures: a programmer's mistake.</exception>
    public static Working Of(Finding finding)
    {
        ArgumentNullException.ThrowIfNull(finding);
        Derivation book = new();
        Derivation rule = finding.Derivation ?? new Derivation();
        if (finding.Basis is { } basis)
        {
            rule = Derive(basis, book);
        }

        LineOrder order = new(rule, book);
        FigureChain chain = new();
        try
        {
            List<WorkingLine> lines = [.. order.Lines.Select(chain.Take)];
            Hold(chain, rule, finding);
            return new Working(finding, lines[..order.Own], lines[order.Own..])
            {
                Actual = rule.Actual,
                Allowed = rule.Allowed,
                Ratio = rule.Ratio,
            };
        }
        catch (NotReproducedException e)
        {
            throw new NotReproducedException($"{finding.Channel} {finding.Rule} {finding.Reference} does not reproduce. {e.Message}", e);
        }
    }

    private static Derivation Derive(FindingBasis basis, Derivation book)
    {
        SolvedState state = basis.State;
        ChannelModel model = basis.Model;
        IReadOnlyList<LegView> legs = LegView.Of(model, state);
        ConditionSymbols.Add(book, basis, legs);
        CircuitSymbols.Add(book, basis, legs);
        Corner corner = state.Corner;
        DeviceSymbols.Add(
            book, state.Transistors[^1], ControlDevice(model, state), "0", model.Channel.Control.Reference, corner.Control.Vbe, model.Control);
        foreach (LegView leg in legs)
        {
            DeviceSymbols.Add(
                book, state.Transistors[leg.Index], leg.Device(model, state), leg.N, leg.Who,
                leg.Odd ? corner.OddPass.Vbe : corner.Pass.Vbe, model.Pass[leg.Class]);
        }

        int point = basis.Point;
        Derivation rule;
        switch (basis.Rule)
        {
            case TransistorRule of:
                rule = new Derivation(Derivation.SubjectOf(state, point));
                of.Derive(rule, state, state.Transistors[point], model.Channel, basis.Rows, basis.Stress);
                break;
            case ResistorRule of:
                rule = new Derivation(resistance: AddResistor(book, basis, point, legs));
                of.Derive(rule, state, state.Resistors[point], model.Channel, basis.Rows, basis.Stress);
                break;
            case LedRule of:
                rule = new Derivation();
                of.Derive(rule, state, (LedPart)model.Slots.Of(basis.Slot)[0].Part, model.Channel, basis.Rows, basis.Stress);
                break;
            default:
                rule = new Derivation();
                ((ChannelRule)basis.Rule).Derive(rule, state, model.Channel, basis.Rows, basis.Stress);
                break;
        }

        return rule;
    }

    /// <summary>The control's device in this corner, or where a ratio peaks inside its windows.</summary>
    private static Devices.BipolarDevice ControlDevice(ChannelModel model, SolvedState state) =>
        state.Index < 0 ? model.Control.Nominal
        : state.Circuit is { } circuit && (state.Corner.Control.Vbe == Extreme.Inside || state.Corner.Control.Hfe == Extreme.Inside) ? circuit.Control
        : model.Control.At(state.Corner.Control);

    /// <summary>Voltage, current and power of the resistor judged.</summary>
    /// <returns>Symbol of its resistance.</returns>
    private static string AddResistor(Derivation book, FindingBasis basis, int point, IReadOnlyList<LegView> legs)
    {
        ResistorPoint resistor = basis.State.Resistors[point];
        int before = basis.State.Resistors.Take(point).Count(r => r.Role == resistor.Role);
        LegView[] having = [.. legs.Where(l => resistor.Role != Role.Averaging || basis.Model.Averaging[l.Class] is not null)];
        string n = resistor.Role is Role.Sense or Role.Averaging ? having[before].N : string.Empty;
        string symbol = resistor.Role switch { Role.Sense => "Rs" + n, Role.Averaging => "Ra" + n, Role.Feed => "Rf", _ => "Rp" };
        if (resistor.Resistance == 0)
        {
            book.Given("VR", 0, "V", "a zero-ohm resistor drops nothing").Solved("IR", resistor.Current, "A", "current through it")
                .Step("PR", "VR x IR", "W", "its dissipation");
            return symbol;
        }

        bool atPin = basis.Model.Channel.PullDownAt == PullDownAt.Pin;
        (string volts, string amperes) = resistor.Role switch
        {
            Role.Sense => ("abs(VE" + n + ")", "VR / " + symbol),
            Role.Averaging => ("abs(Va" + n + ")", "VR / " + symbol),
            Role.Feed => ("IR x Rf", "abs(If)"),
            _ => (atPin ? "abs(Vb + If x Rf)" : "abs(Vb)", "VR / Rp"),
        };
        book.Step("VR", volts, "V", "voltage across it").Step("IR", amperes, "A", "current through it").Step("PR", "VR x IR", "W", "its dissipation");
        return symbol;
    }

    private static void Hold(FigureChain chain, Derivation rule, Finding finding)
    {
        double Shown(double si) => finding.Unit == "K" ? si - Temperature.CelsiusZero : si;
        if (finding.Basis is { State: var state } basis)
        {
            chain.Hold("I", state.LoadCurrent);
            chain.Hold("Vc", state.CollectorVoltage, state.Corner.Supply);
            foreach (LegView leg in LegView.Of(basis.Model, state))
            {
                HoldTransistor(chain, state.Transistors[leg.Index], leg.N);
            }

            HoldTransistor(chain, state.Transistors[^1], "0");
        }

        if (rule.Actual is { } actual && finding.Actual is { } said)
        {
            chain.Hold(actual, Shown(said), Magnitude(finding));
        }

        if (rule.Allowed is { } allowed && finding.Allowed is { } limit)
        {
            chain.Hold(allowed, Shown(limit), Magnitude(finding));
        }

        if (rule.Ratio is { } ratio && finding.StressRatio is { } stress)
        {
            chain.Hold(ratio, stress, 2e-2);
        }
    }

    /// <summary>Magnitudes of which a millionth is what the solve may leave: 10 nV between nodes, 0.1 nA, 0.1 nW, 1 uK.</summary>
    private static double Magnitude(Finding finding) => finding.Unit switch { "V" => finding.Rule == "vcb" ? 1 : 1e-2, "A" => 1e-4, "W" => 1e-4, _ => 1 };

    private static void HoldTransistor(FigureChain chain, in TransistorPoint q, string n)
    {
        chain.Hold("IC" + n, q.Ic);
        chain.Hold("VCE" + n, q.Vce, 1);
        chain.Hold("P" + n, q.Power, Math.Abs(q.Ic) + Math.Abs(q.Ib));
        chain.Hold("Tj" + n, q.Tj - Temperature.CelsiusZero, 1);
    }
}
