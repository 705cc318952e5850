namespace PartCheck.Devices;

/// <summary>Kinds of parameter names on a card.</summary>
internal enum ModelNameKind
{
    /// <summary>A static parameter of the model: read.</summary>
    Static,

    /// <summary>A parameter of charge, time or noise: does not touch the static result.</summary>
    Dynamic,

    /// <summary>Changes the static result beyond the model, unless it stands at its default.</summary>
    Beyond,

    /// <summary>Not a parameter of any simulator's transistor: noted and skipped.</summary>
    Foreign,

    /// <summary>Unknown and one letter off a known name: most likely a slip of the pen.</summary>
    NearMiss,
}

/// <summary>The parameter names of the bipolar card: SPICE level 1, older spellings, and what goes beyond it.</summary>
internal static class ModelCardNames
{
    private static readonly HashSet<string> Static = new(StringComparer.Ordinal)
    {
        "IS", "BF", "NF", "VAF", "IKF", "NKF", "ISE", "NE", "BR", "NR", "VAR", "IKR", "ISC", "NC", "RB", "IRB", "RBM", "RE", "RC",
        "XTI", "EG", "XTB", "TNOM",
    };

    private static readonly HashSet<string> Dynamic = new(StringComparer.Ordinal)
    {
        "CJE", "VJE", "MJE", "CJC", "VJC", "MJC", "XCJC", "CJS", "VJS", "MJS", "FC", "TF", "XTF", "VTF", "ITF", "PTF", "TR", "KF",
        "AF", "XCJS", "XCJC2", "TLEVC", "CTC", "CTE", "CTS", "TVJC", "TVJE", "TVJS", "TITF1", "TITF2", "TTF1", "TTF2", "TTR1", "TTR2",
        "TMJE1", "TMJE2", "TMJC1", "TMJC2", "TMJS1", "TMJS2",
    };

    private static readonly Dictionary<string, string> Spellings = new(StringComparer.Ordinal)
    {
        ["VA"] = "VAF",
        ["VB"] = "VAR",
        ["VBF"] = "VAR",
        ["IK"] = "IKF",
        ["NK"] = "NKF",
        ["PT"] = "XTI",
        ["TREF"] = "TNOM",
        ["T_MEASURED"] = "TNOM",
        ["PE"] = "VJE",
        ["PC"] = "VJC",
        ["ME"] = "MJE",
        ["MC"] = "MJC",
        ["CCS"] = "CJS",
        ["PS"] = "VJS",
        ["MS"] = "MJS",
    };

    /// <summary>Names beyond the model, with the value at which each changes nothing (NaN: none).</summary>
    private static readonly Dictionary<string, double> Beyond = new(StringComparer.Ordinal)
    {
        ["RCO"] = 0,
        ["VO"] = 10,
        ["GAMMA"] = 1e-11,
        ["QCO"] = 0,
        ["QUASIMOD"] = 0,
        ["VG"] = 1.206,
        ["CN"] = 2.42,
        ["D"] = 0.87,
        ["TLEV"] = 0,
        ["ISS"] = 0,
        ["NS"] = 1,
        ["IBE"] = 0,
        ["IBC"] = 0,
        ["C2"] = 0,
        ["C4"] = 0,
        ["LEVEL"] = 1,
        ["T_ABS"] = double.NaN,
        ["T_REL_GLOBAL"] = 0,
        ["T_REL_LOCAL"] = double.NaN,
        ["NEPI"] = double.NaN,
        ["DTEMP"] = 0,
        ["BVC"] = double.NaN,
        ["BVE"] = double.NaN,
        ["BVBC"] = double.NaN,
        ["BVBE"] = double.NaN,
    };

    private static readonly HashSet<string> Foreign = new(StringComparer.Ordinal)
    {
        "MFG", "VCEO", "VCBO", "VEBO", "VCE", "VCES", "ICRATING", "TYPE", "VENDOR", "PRODUCT", "VERSION", "DATE", "PACKAGE", "SUBS",
    };

    /// <summary>First letters of the linear and quadratic temperature coefficients, e.g. <c>TRB1</c>, <c>TVAF2</c>.</summary>
    private static readonly HashSet<string> Coefficients = new(StringComparer.Ordinal)
    {
        "TIS", "TISE", "TISC", "TISS", "TBF", "TBR", "TNF", "TNR", "TNE", "TNC", "TNS", "TVAF", "TVAR", "TIKF", "TIKR", "TIRB", "TRB",
        "TRBM", "TRM", "TRC", "TRE", "TIB",
    };

    /// <summary>The name in upper case and today's spelling.</summary>
    public static string Canonical(string name)
    {
        string upper = name.ToUpperInvariant();
        return Spellings.GetValueOrDefault(upper, upper);
    }

    /// <summary>What a canonical name is; for a near miss, the known name that it resembles.</summary>
    public static (ModelNameKind Kind, string? Resembles) Classify(string name)
    {
        if (Static.Contains(name))
        {
            return (ModelNameKind.Static, null);
        }

        if (Dynamic.Contains(name))
        {
            return (ModelNameKind.Dynamic, null);
        }

        if (Beyond.ContainsKey(name) || IsCoefficient(name))
        {
            return (ModelNameKind.Beyond, null);
        }

        if (Foreign.Contains(name))
        {
            return (ModelNameKind.Foreign, null);
        }

        string? known = Static.Concat(Spellings.Keys).Concat(Dynamic).Concat(Beyond.Keys).FirstOrDefault(k => OneSlipApart(name, k));
        return known is null ? (ModelNameKind.Foreign, null) : (ModelNameKind.NearMiss, known);
    }

    /// <summary>True where the value of a name beyond the model changes nothing.</summary>
    public static bool IsNeutral(string name, double value) => value == Beyond.GetValueOrDefault(name, 0);

    private static bool IsCoefficient(string name) => name.Length > 1 && name[^1] is '1' or '2' && Coefficients.Contains(name[..^1]);

    /// <summary>One letter replaced, missing, too many, or two neighbours swapped.</summary>
    private static bool OneSlipApart(string a, string b)
    {
        if (Math.Abs(a.Length - b.Length) > 1)
        {
            return false;
        }

        int shortest = Math.Min(a.Length, b.Length);
        int head = 0;
        while (head < shortest && a[head] == b[head])
        {
            head++;
        }

        int tail = 0;
        while (tail < shortest - head && a[^(tail + 1)] == b[^(tail + 1)])
        {
            tail++;
        }

        int restA = a.Length - head - tail;
        int restB = b.Length - head - tail;
        bool swapped = restA == 2 && restB == 2 && a[head] == b[head + 1] && a[head + 1] == b[head];
        return Math.Max(restA, restB) <= 1 || swapped;
    }
}
