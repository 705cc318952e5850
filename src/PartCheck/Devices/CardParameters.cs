using System.Globalization;

namespace PartCheck.Devices;

/// <summary>The parameters of one card on their way into <see cref="BipolarParameters"/>.</summary>
internal sealed class CardParameters(string name)
{
    /// <summary>Static parameters that the model has.</summary>
    private static readonly string[] Static =
    [
        "IS", "BF", "NF", "VAF", "IKF", "NKF", "ISE", "NE", "BR", "NR", "VAR", "IKR", "ISC", "NC",
        "RB", "IRB", "RBM", "RE", "RC", "XTI", "EG", "XTB", "TNOM",
    ];

    private static readonly Dictionary<string, string> OtherNames = new(StringComparer.Ordinal)
    {
        ["VA"] = "VAF",
        ["VB"] = "VAR",
        ["IK"] = "IKF",
        ["NK"] = "NKF",
        ["PT"] = "XTI",
        ["TREF"] = "TNOM",
        ["PE"] = "VJE",
        ["ME"] = "MJE",
        ["PC"] = "VJC",
        ["MC"] = "MJC",
        ["PS"] = "VJS",
        ["MS"] = "MJS",
        ["CCS"] = "CJS",
    };

    /// <summary>Known parameters without a part in the static result.</summary>
    private static readonly string[] Dynamic =
    [
        "CJE", "VJE", "MJE", "TF", "XTF", "VTF", "ITF", "PTF", "CJC", "VJC", "MJC", "XCJC", "XCJC2", "TR", "CJS", "VJS", "MJS", "FC",
        "KF", "AF", "CN", "D",
    ];

    /// <summary>Parameters that change the static result beyond this model, each with the value that does not.</summary>
    private static readonly Dictionary<string, double> Beyond = new(StringComparer.Ordinal)
    {
        ["RCO"] = 0,
        ["VO"] = 0,
        ["GAMMA"] = 0,
        ["QCO"] = 0,
        ["TLEV"] = 0,
        ["TLEVC"] = 0,
        ["ISS"] = 0,
        ["QUASIMOD"] = 0,
        ["TRE1"] = 0,
        ["TRE2"] = 0,
        ["TRC1"] = 0,
        ["TRC2"] = 0,
        ["TRB1"] = 0,
        ["TRB2"] = 0,
        ["TRM1"] = 0,
        ["TRM2"] = 0,
        ["TBF1"] = 0,
        ["TBF2"] = 0,
        ["TBR1"] = 0,
        ["TBR2"] = 0,
        ["TIKF1"] = 0,
        ["TIKF2"] = 0,
        ["TIRB1"] = 0,
        ["TIRB2"] = 0,
        ["TNF1"] = 0,
        ["TNF2"] = 0,
        ["TNE1"] = 0,
        ["TNE2"] = 0,
        ["TVAF1"] = 0,
        ["TVAF2"] = 0,
        ["TISE1"] = 0,
        ["TISE2"] = 0,
        ["IBE"] = 0,
        ["IBC"] = 0,
    };

    /// <summary>What card collections add that no simulator reads.</summary>
    private static readonly string[] Foreign = ["MFG", "VCEO", "ICRATING", "LEVEL", "TYPE", "VENDOR", "SUBS", "NS"];

    private readonly Dictionary<string, double> values = new(StringComparer.Ordinal);
    private readonly List<string> notes = [];
    private readonly List<string> errors = [];

    public void Stray(string item) => errors.Add($"\"{item}\" on the card {name} is no parameter: NAME=value is wanted.");

    public void Take(string key, string text)
    {
        string upper = key.ToUpperInvariant();
        string canonical = OtherNames.GetValueOrDefault(upper, upper);
        if (Foreign.Contains(canonical))
        {
            notes.Add($"{key} is not read");
            return;
        }

        bool isStatic = Static.Contains(canonical);
        bool isBeyond = Beyond.ContainsKey(canonical);
        if (!isStatic && !isBeyond && !Dynamic.Contains(canonical))
        {
            if (Static.FirstOrDefault(s => Near(s, canonical)) is { } near)
            {
                errors.Add($"The parameter {key} on the card {name} is not known; {near} is close to it.");
            }
            else
            {
                notes.Add($"{key} is not read");
            }

            return;
        }

        if (!CardNumber.TryParse(text, out double value))
        {
            errors.Add($"{key}={text} on the card {name} is no number.");
            return;
        }

        if (isBeyond)
        {
            if (value != Beyond[canonical])
            {
                errors.Add($"{key}={text} on the card {name} changes the static result beyond the Gummel-Poon model: the card is refused.");
            }

            return;
        }

        if (isStatic && values.ContainsKey(canonical))
        {
            notes.Add($"{canonical} stands on the card twice; the last one counts");
        }

        values[canonical] = value;
    }

    public ModelCardResult Result()
    {
        foreach ((string key, bool zero) in (ReadOnlySpan<(string, bool)>)
            [("IS", false), ("BF", false), ("NF", false), ("NE", false), ("BR", false), ("NR", false), ("NC", false), ("ISE", true), ("ISC", true),
             ("RB", true), ("RBM", true), ("RE", true), ("RC", true), ("VAF", true), ("VAR", true), ("IKF", true), ("IKR", true), ("IRB", true)])
        {
            if (values.TryGetValue(key, out double value) && (zero ? value < 0 : value <= 0))
            {
                errors.Add(string.Create(CultureInfo.InvariantCulture, $"{key} of the card {name} is {value}: a value {(zero ? "at least" : "above")} zero is wanted."));
            }
        }

        if (errors.Count > 0)
        {
            return new ModelCardResult(null, errors);
        }

        List<string> assumed = [];
        if (!values.ContainsKey("IS"))
        {
            assumed.Add("IS 1e-16 A");
        }

        if (!values.ContainsKey("BF"))
        {
            assumed.Add("BF 100");
        }

        BipolarParameters d = new();
        return new ModelCardResult(
            new ModelCard(name, d with
            {
                Is = Get("IS", d.Is),
                Bf = Get("BF", d.Bf),
                Nf = Get("NF", d.Nf),
                Vaf = Limit("VAF"),
                Ikf = Limit("IKF"),
                Nkf = Get("NKF", d.Nkf),
                Ise = Get("ISE", 0),
                Ne = Get("NE", d.Ne),
                Br = Get("BR", d.Br),
                Nr = Get("NR", d.Nr),
                Var = Limit("VAR"),
                Ikr = Limit("IKR"),
                Isc = Get("ISC", 0),
                Nc = Get("NC", d.Nc),
                Rb = Get("RB", 0),
                Irb = Limit("IRB"),
                Rbm = values.GetValueOrDefault("RBM") is var rbm and > 0 ? rbm : double.NaN,
                Re = Get("RE", 0),
                Rc = Get("RC", 0),
                Xti = Get("XTI", d.Xti),
                Eg = Get("EG", d.Eg),
                Xtb = Get("XTB", 0),
                Tnom = Get("TNOM", 27) + Quantities.Temperature.CelsiusZero,
            }, notes, assumed), []);
    }

    private double Get(string key, double absent) => values.GetValueOrDefault(key, absent);

    /// <summary>Absent or 0 means no limit.</summary>
    private double Limit(string key) => values.GetValueOrDefault(key) is var value and > 0 ? value : double.PositiveInfinity;

    /// <summary>One letter replaced, left out or added, or a confusion of l, I, 1 and O, 0.</summary>
    private static bool Near(string known, string met)
    {
        string Plain(string s) => s.Replace('L', 'I').Replace('1', 'I').Replace('0', 'O');
        if (Plain(known) == Plain(met))
        {
            return true;
        }

        if (known.Length < 3 || Math.Abs(known.Length - met.Length) > 1)
        {
            return false;
        }

        if (known.Length == met.Length)
        {
            return known.Zip(met).Count(p => p.First != p.Second) == 1;
        }

        (string longer, string shorter) = known.Length > met.Length ? (known, met) : (met, known);
        return Enumerable.Range(0, longer.Length).Any(i => longer.Remove(i, 1) == shorter);
    }
}
