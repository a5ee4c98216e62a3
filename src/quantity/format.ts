/** Numbers for people: a sensible number of digits, no exponent, the unit in the size a person would say. */

/** Up to `digits` significant digits, trailing zeros dropped, thousands not parted: 76.2, 0.56, 1700. */
export function tidy(value: number, digits = 6): string {
  if (!Number.isFinite(value)) return String(value);
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(digits));
  const decimals = Math.min(20, Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(rounded)))));
  const text = rounded.toFixed(decimals);
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

/** Exactly `digits` significant digits, for columns that line up: 14.50, 205.0, 1700. */
export function significantText(value: number, digits: number): string {
  if (value === 0 || !Number.isFinite(value)) return String(value);
  const rounded = Number(value.toPrecision(digits));
  const decimals = digits - 1 - Math.floor(Math.log10(Math.abs(rounded)));
  return rounded.toFixed(Math.min(20, Math.max(0, decimals)));
}

/** `3.48 µH`, `240 µH`, `1.2 mH`. */
export function inductanceText(uH: number): string {
  if (Math.abs(uH) >= 1e4) return `${tidy(uH / 1e3, 4)} mH`;
  return Math.abs(uH) < 1 && uH !== 0 ? `${tidy(uH * 1e3, 3)} nH` : `${tidy(uH, 4)} µH`;
}

/** `1700 kHz`, `12.5 MHz`. */
export function frequencyText(kHz: number): string {
  return Math.abs(kHz) >= 1e4 ? `${tidy(kHz / 1e3, 4)} MHz` : `${tidy(kHz, 4)} kHz`;
}

/** `380 pF`, `12 nF`. */
export function capacitanceText(pF: number): string {
  return Math.abs(pF) >= 1e4 ? `${tidy(pF / 1e3, 4)} nF` : `${tidy(pF, 4)} pF`;
}

/** Millimetres, to hundredths unless finer is asked for: `76.2 mm`. */
export function lengthText(mm: number, decimals = 2): string {
  return `${trimmed(mm, decimals)} mm`;
}

/** Wire in metres: `12.34 m`. */
export function wireText(m: number): string {
  return `${trimmed(m, 2)} m`;
}

/** `2.31 Ω`, `14.2 kΩ`, `10 MΩ`. */
export function resistanceText(ohm: number): string {
  if (Math.abs(ohm) >= 1e6) return `${tidy(ohm / 1e6, 3)} MΩ`;
  return Math.abs(ohm) >= 1e4 ? `${tidy(ohm / 1e3, 3)} kΩ` : `${tidy(ohm, 3)} Ω`;
}

/** `5 %` of a fraction 0.05. */
export function percentText(fraction: number): string {
  return `${tidy(fraction * 100, 3)} %`;
}

function trimmed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  const plain = text.includes('.') ? text.replace(/\.?0+$/, '') : text;
  return plain === '-0' ? '0' : plain;
}
