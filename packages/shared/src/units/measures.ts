/** Exact by definition: 1959 agreement (pound), UK Weights and Measures Act 1985 (gallon), acre = 4840 yd². */
export const POUND_KG = 0.45359237;
export const OUNCE_KG = 0.028349523125;
export const STONE_KG = 6.35029318;
export const DRAM_KG = 0.0017718451953125;
export const ACRE_M2 = 4046.8564224;
export const HECTARE_M2 = 10_000;
export const GALLON_L = 4.54609;
export const US_GALLON_L = 3.785411784;
export const KNOT_M_PER_S = 1852 / 3600;

/** Pounds and ounces as kilograms, exact. */
export function poundsAndOuncesToKg(pounds: number, ounces: number): number {
  return pounds * POUND_KG + ounces * OUNCE_KG;
}

/** Kilograms as whole pounds and ounces: the total of ounces is rounded (halves up), then split, so 16 oz never appears. */
export function kgToPoundsAndOunces(kg: number): { pounds: number; ounces: number } {
  const ounces = Math.floor(kg / OUNCE_KG + 0.5);
  return { pounds: Math.floor(ounces / 16), ounces: ounces % 16 };
}

export function celsiusToFahrenheit(celsius: number): number {
  return (celsius * 9) / 5 + 32;
}

export function fahrenheitToCelsius(fahrenheit: number): number {
  return ((fahrenheit - 32) * 5) / 9;
}
