using PartCheck.Rules;
using PartCheck.Tests.Golden;
using Xunit;

namespace PartCheck.Tests.Rules;

public class RuleBookTests
{
    /// <summary>The approved list: identifiers are stable, reports and concessions quote them.</summary>
    [Fact]
    public void TheRulesJudgedAreTheApprovedOnes() => Assert.Equal(
        ["vce", "vcb", "ic", "power", "junction", "soa", "stability", "sharing", "r-power", "r-voltage", "r-film", "led-current", "current", "headroom", "drive",
            "pin-current", "off", "bill"],
        RuleBook.Judged);

    /// <summary>Identifier, title, unit, whether it is always asked, and source of every rule, as a person approved them.</summary>
    [Fact]
    public void TitlesUnitsAndSourcesAreTheApprovedOnes() => ApprovedFile.Holds("rules.txt", string.Concat(RuleBook.Entries.Select(e =>
        $"{e.Id}\n  {e.Title}\n  unit {(e.Unit.Length > 0 ? e.Unit : "none")}; {(e.AlwaysAsked ? "always asked" : "asked by table or channel")}\n  {e.Source}\n")));

    [Fact]
    public void WhatIsNotJudgedIsSaid() => Assert.Empty(RuleBook.NotJudged);

    [Fact]
    public void EveryRuleHasATitleAUnitAndASource() => Assert.All(RuleBook.Entries, rule =>
    {
        Assert.NotEmpty(rule.Title);
        Assert.True(rule.Unit is "V" or "A" or "W" or "K" or "");
        Assert.NotEmpty(rule.Source);
    });

    /// <summary>A rule is found by itself; so is its absence from the tests.</summary>
    [Fact]
    public void EveryRuleThatReadsStatesHasItsTests() => Assert.Equal(
        RuleBook.StateRules.Select(r => r.GetType().Name).Order(StringComparer.Ordinal),
        Concrete<RuleTests>().Select(t => t.BaseType!).Where(b => b.IsGenericType).Select(b => b.GetGenericArguments()[0].Name).Order(StringComparer.Ordinal));

    [Fact]
    public void EveryIdentifierHasItsTests()
    {
        IEnumerable<string> tested = Concrete<RuleTests>().Select(t => ((RuleTests)Activator.CreateInstance(t)!).Id)
            .Concat(Concrete<ExactRuleTests>().Select(t => ((ExactRuleTests)Activator.CreateInstance(t)!).Id));
        Assert.Equal(RuleBook.Judged.Order(StringComparer.Ordinal), tested.Distinct().Order(StringComparer.Ordinal));
    }

    private static IEnumerable<Type> Concrete<T>() =>
        typeof(RuleBookTests).Assembly.GetTypes().Where(t => t.IsSubclassOf(typeof(T)) && !t.IsAbstract);
}
