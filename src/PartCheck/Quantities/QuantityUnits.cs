using System.Text;

namespace PartCheck.Quantities;

/// <summary>The units that each kind of quantity is written in, with prefixes: p n u m k M G; m is milli, M is mega.</summary>
public static class QuantityUnits
{
    private const double CelsiusZero = 273.15;

    private static readonly Dictionary<string, int> Prefixes = new(StringComparer.Ordinal)
    {
        [""] = 0,
        ["p"] = -12,
        ["n"] = -9,
        ["u"] = -6,
        ["m"] = -3,
        ["k"] = 3,
        ["K"] = 3,
        ["M"] = 6,
        ["G"] = 9,
    };

    private static readonly Dictionary<QuantityKind, UnitSpelling[]> Spellings = new()
    {
        [QuantityKind.Voltage] = [new("V"), new("VDC"), new("volt"), new("volts")],
        [QuantityKind.Current] = [new("A"), new("ADC"), new("amp"), new("amps"), new("ampere"), new("amperes")],
        [QuantityKind.Power] = [new("W"), new("watt"), new("watts")],
        [QuantityKind.Resistance] =
        [
            new("\u03A9"), new("ohm"), new("ohms"), new("R"), new("", AnyCase: false, PrefixNeeded: true),
            new("megohm", 6, Prefixed: false), new("megohms", 6, Prefixed: false), new("meg", 6, Prefixed: false),
            new("kilohm", 3, Prefixed: false), new("kilohms", 3, Prefixed: false),
            new("milliohm", -3, Prefixed: false), new("milliohms", -3, Prefixed: false),
        ],
        [QuantityKind.Temperature] =
        [
            new("\u00B0C", 0, CelsiusZero, Prefixed: false), new("C", 0, CelsiusZero, Prefixed: false),
            new("K", AnyCase: false, Prefixed: false), new("kelvin", Prefixed: false),
            new("Celsius", 0, CelsiusZero, Prefixed: false), new("\u00B0Celsius", 0, CelsiusZero, Prefixed: false),
        ],
        [QuantityKind.TemperatureDelta] =
        [
            new("K", AnyCase: false, Prefixed: false), new("\u00B0C", Prefixed: false), new("C", Prefixed: false),
            new("kelvin", Prefixed: false), new("kelvins", Prefixed: false),
        ],
        [QuantityKind.ThermalResistance] =
        [
            new("K/W"), new("\u00B0C/W"), new("C/W"), new("K/mW", 3, AnyCase: false, Prefixed: false),
            new("\u00B0C/mW", 3, AnyCase: false, Prefixed: false), new("C/mW", 3, AnyCase: false, Prefixed: false),
        ],
        [QuantityKind.PowerSlope] = [new("W/K"), new("W/\u00B0C"), new("W/C")],
        [QuantityKind.CurrentSlope] = [new("A/K"), new("A/\u00B0C"), new("A/C")],
        [QuantityKind.Frequency] = [new("Hz"), new("hertz")],
        [QuantityKind.Time] = [new("s", AnyCase: false), new("sec", Prefixed: false), new("second", Prefixed: false), new("seconds", Prefixed: false)],
        [QuantityKind.Percent] = [new("%", -2, Prefixed: false), new("percent", -2, Prefixed: false)],
        [QuantityKind.TemperatureCoefficient] =
        [
            new("ppm/K", -6, Prefixed: false), new("ppm/\u00B0C", -6, Prefixed: false), new("ppm/C", -6, Prefixed: false),
            new("ppm", -6, Prefixed: false), new("%/K", -2, Prefixed: false), new("%/\u00B0C", -2, Prefixed: false),
            new("1/K", AnyCase: false, Prefixed: false),
        ],
        [QuantityKind.Number] = [],
    };

    /// <summary>The unit of a bare number where neither cell nor header names one: V, A, W, ohm, degC, K, K/W, W/K, A/K, Hz, s, %, ppm/K, none.</summary>
    public static QuantityUnit BareUnitOf(QuantityKind kind) => kind switch
    {
        QuantityKind.Temperature => new(0, CelsiusZero),
        QuantityKind.Percent => new(-2),
        QuantityKind.TemperatureCoefficient => new(-6),
        _ => new(0),
    };

    /// <summary>The unit of a bare number, as a person writes it; empty for pure numbers.</summary>
    public static string BareSymbolOf(QuantityKind kind) => kind switch
    {
        QuantityKind.Voltage => "V",
        QuantityKind.Current => "A",
        QuantityKind.Power => "W",
        QuantityKind.Resistance => "ohm",
        QuantityKind.Temperature => "degC",
        QuantityKind.TemperatureDelta => "K",
        QuantityKind.ThermalResistance => "K/W",
        QuantityKind.PowerSlope => "W/K",
        QuantityKind.CurrentSlope => "A/K",
        QuantityKind.Frequency => "Hz",
        QuantityKind.Time => "s",
        QuantityKind.Percent => "%",
        QuantityKind.TemperatureCoefficient => "ppm/K",
        _ => string.Empty,
    };

    /// <summary>What is wanted where a value of the kind stands, with an example.</summary>
    public static string WantedOf(QuantityKind kind) => kind switch
    {
        QuantityKind.Voltage => "a voltage such as 5 V",
        QuantityKind.Current => "a current such as 11 mA",
        QuantityKind.Power => "a power such as 250 mW",
        QuantityKind.Resistance => "a resistance such as 4.7 kohm, 4k7 or 47R",
        QuantityKind.Temperature => "a temperature such as 85 degC",
        QuantityKind.TemperatureDelta => "a temperature difference such as 10 K",
        QuantityKind.ThermalResistance => "a thermal resistance such as 250 K/W",
        QuantityKind.PowerSlope => "a power slope such as 2 mW/K",
        QuantityKind.CurrentSlope => "a current slope such as 0.5 mA/K",
        QuantityKind.Frequency => "a frequency such as 1 kHz",
        QuantityKind.Time => "a time such as 10 ms",
        QuantityKind.Percent => "a percentage such as 5 %",
        QuantityKind.TemperatureCoefficient => "a temperature coefficient such as 100 ppm/K",
        _ => "a number",
    };

    /// <summary>Reads a unit of a kind, such as <c>mA</c> for a current.</summary>
    /// <param name="text">The unit, blanks allowed; both code points of ohm and of micro are taken.</param>
    /// <param name="kind">The kind of quantity.</param>
    /// <param name="unit">The unit read.</param>
    /// <returns>False where the kind is not written in this unit.</returns>
    public static bool TryFind(string text, QuantityKind kind, out QuantityUnit unit)
    {
        ArgumentNullException.ThrowIfNull(text);
        string symbol = Plain(text);
        unit = default;
        if (symbol.Length > 24)
        {
            return false;
        }

        // Exact case first, so that MEG is not mega-EG and K stays a kelvin where kelvins are meant.
        foreach (StringComparison comparison in (ReadOnlySpan<StringComparison>)[StringComparison.Ordinal, StringComparison.OrdinalIgnoreCase])
        {
            foreach (UnitSpelling spelling in Spellings[kind])
            {
                if (spelling.TryMatch(symbol, comparison, out unit))
                {
                    return true;
                }
            }
        }

        return false;
    }

    /// <summary>True where the text is a unit of any kind.</summary>
    public static bool IsAnyUnit(string text)
    {
        foreach (QuantityKind kind in Spellings.Keys)
        {
            if (TryFind(text, kind, out _))
            {
                return true;
            }
        }

        return false;
    }

    private static string Plain(string text)
    {
        StringBuilder plain = new(text.Length);
        foreach (char c in text)
        {
            switch (c)
            {
                case '\u2126':
                    plain.Append('\u03A9');
                    break;
                case '\u00B5' or '\u03BC':
                    plain.Append('u');
                    break;
                case '\u00BA' or '\u02DA':
                    plain.Append('\u00B0');
                    break;
                case '\u2103':
                    plain.Append("\u00B0C");
                    break;
                default:
                    if (!char.IsWhiteSpace(c))
                    {
                        plain.Append(c);
                    }

                    break;
            }
        }

        return plain.ToString()
            .Replace("degrees", "\u00B0", StringComparison.OrdinalIgnoreCase)
            .Replace("degree", "\u00B0", StringComparison.OrdinalIgnoreCase)
            .Replace("deg", "\u00B0", StringComparison.OrdinalIgnoreCase);
    }

    private readonly record struct UnitSpelling(
        string Symbol, int Exponent = 0, double Offset = 0, bool AnyCase = true, bool Prefixed = true, bool PrefixNeeded = false)
    {
        internal bool TryMatch(string text, StringComparison comparison, out QuantityUnit unit)
        {
            unit = default;
            if (comparison != StringComparison.Ordinal && !AnyCase)
            {
                return false;
            }

            if (!text.EndsWith(Symbol, comparison) || !Prefixes.TryGetValue(text[..^Symbol.Length], out int prefix))
            {
                return false;
            }

            bool bare = text.Length == Symbol.Length;
            if ((!Prefixed && !bare) || (PrefixNeeded && bare))
            {
                return false;
            }

            unit = new QuantityUnit(Exponent + prefix, Offset);
            return true;
        }
    }
}
