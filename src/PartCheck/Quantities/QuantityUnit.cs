namespace PartCheck.Quantities;

/// <summary>
/// A unit as a power of ten and an offset: value in SI = number x 10^<paramref name="Exponent"/> + <paramref name="Offset"/>.
/// </summary>
/// <param name="Exponent">Power of ten; mA: -3.</param>
/// <param name="Offset">What is added, in SI; degrees Celsius: 273.15 [K], all others 0.</param>
public readonly record struct QuantityUnit(int Exponent, double Offset = 0);
