using PartCheck.Channels;
using PartCheck.Derating;
using PartCheck.OperatingPoints;
using PartCheck.Parts;

namespace PartCheck.Rules;

/// <summary>The derating rows a rule reads, looked up once for a part.</summary>
/// <param name="Own">The row of the rule itself.</param>
/// <param name="ResistorPower">The row of <c>r-power</c>, which bounds the voltage, too.</param>
public readonly record struct RuleRows(DeratingRow Own, DeratingRow ResistorPower);

/// <summary>
/// One rule: identifier, what it says in a line, the unit of its values, its equation's source. A rule that reads states is
/// a pure function of one solved state and one part; the worst over all corners is taken in one place, by the judge.
/// Identifiers are stable: reports and concessions quote them.
/// </summary>
public abstract class Rule
{
    /// <summary>Identifier.</summary>
    public abstract string Id { get; }

    /// <summary>What the rule demands, one line.</summary>
    public abstract string Title { get; }

    /// <summary>SI unit of actual and allowed value.</summary>
    public abstract string Unit { get; }

    /// <summary>Where the rule comes from.</summary>
    public abstract string Source { get; }

    /// <summary>True where every channel is judged by it; false where table or channel must ask for it.</summary>
    public virtual bool AlwaysAsked => true;

    /// <summary>True where the rule reads this state.</summary>
    public virtual bool Reads(SolvedState state) => state is { State: ChannelState.On };

    /// <summary>What a finding says beside its numbers: which part of the rule was judged; null: nothing.</summary>
    /// <param name="placement">What was judged.</param>
    /// <param name="channel">Its channel.</param>
    /// <param name="stress">The worst stress.</param>
    public virtual string? Remark(Placement placement, BoundChannel channel, in Stress stress) => null;
}

/// <summary>A rule that judges transistors.</summary>
public abstract class TransistorRule : Rule
{
    /// <summary>True where the rule applies to the role.</summary>
    public virtual bool AppliesTo(Role role) => true;

    /// <summary>True where the table or the channel asks for it; a rule that nobody asked for is not listed.</summary>
    public virtual bool Asked(Transistor part, BoundChannel channel, in RuleRows rows) => true;

    /// <summary>Judges one transistor in one state.</summary>
    public abstract Stress Evaluate(SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows);

    /// <summary>Writes the equation down with its numbers, for a state that <see cref="Evaluate"/> judged: the same equation, as a person reads it.</summary>
    public abstract void Derive(Derivation steps, SolvedState state, in TransistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress);

    /// <summary>The cell of the rating that decides; null: not given.</summary>
    public abstract string? DecidingCell(Transistor part);
}

/// <summary>A rule that judges resistors.</summary>
public abstract class ResistorRule : Rule
{
    /// <summary>True where the rule applies to the part.</summary>
    public virtual bool AppliesTo(ResistorPart part) => true;

    /// <inheritdoc/>
    public override bool Reads(SolvedState state) => state is { State: ChannelState.On or ChannelState.Unfed };

    /// <summary>Judges one resistor in one state.</summary>
    public abstract Stress Evaluate(SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows);

    /// <summary>Writes the equation down with its numbers, for a state that <see cref="Evaluate"/> judged: the same equation, as a person reads it.</summary>
    public abstract void Derive(Derivation steps, SolvedState state, in ResistorPoint point, BoundChannel channel, in RuleRows rows, in Stress stress);

    /// <summary>The cell of the rating that decides; null: not given.</summary>
    public abstract string? DecidingCell(ResistorPart part);
}

/// <summary>A rule that judges the load's LEDs, where the channel names them.</summary>
public abstract class LedRule : Rule
{
    /// <inheritdoc/>
    public override bool AlwaysAsked => false;

    /// <summary>Judges one LED in one state.</summary>
    public abstract Stress Evaluate(SolvedState state, LedPart part, BoundChannel channel, in RuleRows rows);

    /// <summary>Writes the equation down with its numbers, for a state that <see cref="Evaluate"/> judged: the same equation, as a person reads it.</summary>
    public abstract void Derive(Derivation steps, SolvedState state, LedPart part, BoundChannel channel, in RuleRows rows, in Stress stress);

    /// <summary>The cell of the rating that decides; null: not given.</summary>
    public abstract string? DecidingCell(LedPart part);
}

/// <summary>A rule that judges the channel as a whole.</summary>
public abstract class ChannelRule : Rule
{
    /// <summary>True where the table or the channel asks for it; a rule that nobody asked for is not listed.</summary>
    public virtual bool Asked(BoundChannel channel, in RuleRows rows) => true;

    /// <summary>Judges the channel in one state.</summary>
    public abstract Stress Evaluate(SolvedState state, BoundChannel channel, in RuleRows rows);

    /// <summary>Writes the equation down with its numbers, for a state that <see cref="Evaluate"/> judged: the same equation, as a person reads it.</summary>
    public abstract void Derive(Derivation steps, SolvedState state, BoundChannel channel, in RuleRows rows, in Stress stress);

    /// <summary>The cell of the limit that decides; null: not given.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="stress">The worst stress, where the end of a window matters.</param>
    public abstract string? DecidingCell(BoundChannel channel, in Stress stress);
}
