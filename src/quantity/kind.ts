/** What a number may be a measure of: the unit the code counts it in, the sane range, an example for messages. */

export type KindName =
  | 'length'
  | 'inductance'
  | 'capacitance'
  | 'frequency'
  | 'width'
  | 'ratio'
  | 'scale'
  | 'resistance'
  | 'angle'
  | 'temperature'
  | 'mass'
  | 'wire'
  | 'height';

export interface Kind {
  /** With its article, for messages: `a length`. */
  readonly noun: string;
  /** Unit of the values handed out, by the name the unit library knows. */
  readonly unit: string;
  /** Least and greatest value accepted, in that unit. Outside lies a slip of the pen, not a coil. */
  readonly low: number;
  readonly high: number;
  /** Units to offer when none was written, the likeliest first. */
  readonly offered: readonly string[];
  /** How one is written, for messages. */
  readonly example: string;
}

export const KINDS: Readonly<Record<KindName, Kind>> = {
  length: { noun: 'a length', unit: 'mm', low: 1e-3, high: 1e4, offered: ['mm', 'in'], example: '76 mm or 3 1/2 in' },
  inductance: { noun: 'an inductance', unit: 'uH', low: 1e-3, high: 1e6, offered: ['uH', 'mH'], example: '240 uH' },
  capacitance: { noun: 'a capacitance', unit: 'pF', low: 1e-2, high: 1e6, offered: ['pF', 'nF'], example: '380 pF' },
  frequency: { noun: 'a frequency', unit: 'kHz', low: 1, high: 1e6, offered: ['kHz', 'MHz'], example: '530 kHz' },
  width: { noun: 'a width', unit: 'kHz', low: 1e-3, high: 1e5, offered: ['kHz', 'Hz'], example: '3.4 kHz' },
  ratio: { noun: 'a proportion', unit: '1', low: 1e-6, high: 1, offered: ['%'], example: '5 % or 0.05' },
  scale: { noun: 'a scale', unit: '1', low: 0.9, high: 1.1, offered: ['%'], example: '100.3 %' },
  resistance: { noun: 'a resistance', unit: 'ohm', low: 1e-6, high: 1e9, offered: ['ohm', 'kohm'], example: '2.5 ohm' },
  angle: { noun: 'an angle', unit: 'deg', low: 1e-3, high: 3.6e5, offered: ['deg'], example: '30 deg' },
  temperature: { noun: 'a temperature', unit: 'degC', low: -80, high: 300, offered: ['degC'], example: '20 degC' },
  mass: { noun: 'a weight', unit: 'g', low: 1e-3, high: 1e5, offered: ['g', 'oz'], example: '35 g' },
  wire: { noun: 'a length of wire', unit: 'm', low: 1e-2, high: 1e4, offered: ['m', 'ft'], example: '15.2 m' },
  height: { noun: 'a height', unit: 'm', low: 1e-2, high: 1e3, offered: ['m', 'ft'], example: '8 m or 26 ft' },
};
