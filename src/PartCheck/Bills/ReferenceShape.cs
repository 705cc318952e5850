using System.Text.RegularExpressions;

namespace PartCheck.Bills;

/// <summary>What reference designators look like, and what values look like: the proof for columns whose header is doubtful.</summary>
internal static partial class ReferenceShape
{
    private const double Most = 0.7;
    private const double Share = 0.3;
    private const double Some = 0.1;

    /// <summary>
    /// True where most texts begin as reference designators do (<c>R1</c>, <c>IC201</c>, <c>C1, C2</c>) and hardly one is there
    /// twice; or where a part of them does, and the first of a usual kind is among them: cases and cables have no reference.
    /// </summary>
    internal static bool AreReferences(IReadOnlyList<string> texts)
    {
        int count = texts.Count(t => Reference().IsMatch(t));
        bool enough = count >= Most * texts.Count || (count >= Share * texts.Count && texts.Any(t => First().IsMatch(t)));
        return enough && texts.Distinct(StringComparer.OrdinalIgnoreCase).Count() >= Most * texts.Count;
    }

    /// <summary>True where some texts begin as values do: <c>10k</c>, <c>4k7</c>, <c>100nF</c>, <c>470R 1/10W</c>.</summary>
    internal static bool AreValues(IReadOnlyList<string> texts) =>
        texts.Count(t => Value().IsMatch(t)) >= Some * texts.Count && texts.Count(t => Reference().IsMatch(t)) < Most * texts.Count;

    /// <summary>
    /// True where a reference has the letters of another part than a resistor, so that a number beside it is no resistance: D1 with
    /// <c>M7</c>, IC1 with <c>4040</c>. The letters are common practice, no source.
    /// </summary>
    internal static bool IsOfAnotherPart(string reference) => OtherPart().IsMatch(reference);

    [GeneratedRegex(@"^(?:C|D|F|FB|IC|J|K|L|LED|P|Q|S|SW|T|TP|U|X|Y|Z)[0-9]", RegexOptions.CultureInvariant | RegexOptions.IgnoreCase)]
    private static partial Regex OtherPart();

    [GeneratedRegex(@"^[A-Za-z]{1,4}_?[0-9]{1,4}(?:[\s,;/.\u2013-].*)?$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex Reference();

    [GeneratedRegex(@"^[RCDQU]1(?:[\s,;/\u2013-].*)?$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex First();

    [GeneratedRegex(@"^[0-9]+(?:[.,][0-9]+)?\s*(?:[RrkKMGpnu\u00B5\u03BCm\u03A9\u2126]|[Oo]hm)[0-9]*(?:[FH\u03A9\u2126Rr]|[Oo]hms?)?\??(?:[\s,;/].*)?$", RegexOptions.CultureInvariant | RegexOptions.Singleline)]
    private static partial Regex Value();
}
