namespace PartCheck.OperatingPoints;

/// <summary>
/// What varies without a step in a channel's box. A position in a dimension runs from 0, the smallest (the weak pin), to 1, the largest
/// (the strong pin). Heat and an assumed coupling are not among them: they are the two ends of a history, not a range.
/// </summary>
public enum BoxDimension
{
    /// <summary>Load supply.</summary>
    Supply,

    /// <summary>Load drop.</summary>
    LoadDrop,

    /// <summary>Ambient temperature.</summary>
    Ambient,

    /// <summary>Pin: level and resistance together.</summary>
    Pin,

    /// <summary>Feed resistor.</summary>
    Feed,

    /// <summary>Pull-down resistor.</summary>
    PullDown,

    /// <summary>Sense resistors of the rest.</summary>
    Sense,

    /// <summary>Averaging resistors of the rest.</summary>
    Averaging,

    /// <summary>Sense resistor of the odd leg.</summary>
    OddSense,

    /// <summary>Averaging resistor of the odd leg.</summary>
    OddAveraging,

    /// <summary>VBE window of the control.</summary>
    ControlVbe,

    /// <summary>hFE window of the control.</summary>
    ControlHfe,

    /// <summary>VBE window of the pass transistors of the rest.</summary>
    PassVbe,

    /// <summary>hFE window of the pass transistors of the rest.</summary>
    PassHfe,

    /// <summary>VBE window of the odd leg's pass transistor.</summary>
    OddVbe,

    /// <summary>hFE window of the odd leg's pass transistor.</summary>
    OddHfe,
}
