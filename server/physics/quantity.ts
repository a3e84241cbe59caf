import { dimensionWith, dimensions } from './quantity-dimensions';
import type { Dimension, DimensionDescription } from './quantity-dimensions';
import { unitOf } from './quantity-units';
import type { DimensionExponents, UnitScale } from './quantity-units';

export { dimensions } from './quantity-dimensions';
export type { Dimension } from './quantity-dimensions';
export { formatQuantity, quantityParts } from './quantity-format';

/** What a typed text was understood to be, or why not in plain words. */
export type QuantityReading =
  { readonly ok: true; readonly value: number } | { readonly ok: false; readonly message: string };

/** Longest text that is looked at; nothing an engineer types as one quantity is longer. */
const longestText = 80;

const numberPattern = /^([+-]?)(\d+\.?\d*|\.\d+)(?:[eE]([+-]?\d+))?/;
const timesTenPattern = /^\s*[×x*·]\s*10\s*\^\s*([+-]?\d+)/;
/** IEC 60062 letter code: the multiplier stands where the decimal point would. */
const letterCode = /^([+-]?)(\d+)([RrkKMGpnuμmFH])(\d+)(.*)$/;

const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Replaces look-alike characters by the ones that the grammar knows. */
function clean(text: string): string {
  return text
    .replace(
      /[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/g,
      (run) => `^${[...run].map((c) => (c === '⁻' ? '-' : c === '⁺' ? '' : String(superscripts.indexOf(c)))).join('')}`,
    )
    .replace(/[\u2212\u2010-\u2013\uFE63\uFF0D]/g, '-')
    .replace(/[\u00A0\u2000-\u200A\u202F\u3000\t\r\n]/g, ' ')
    .replace(/\u00B5/g, 'μ')
    .replace(/\u2126/g, 'Ω')
    .replace(/[\u2033\u201C\u201D]/g, '"')
    .replace(/[\u22C5\u2219\u2022]/g, '·')
    .trim();
}

const isGravity = (dimension: Dimension): boolean =>
  dimension === 'acceleration' || dimension === 'accelerationDensity';

function multiply(a: UnitScale, b: UnitScale, power: number): UnitScale {
  return {
    coefficient: a.coefficient * b.coefficient ** power,
    exponent: a.exponent + b.exponent * power,
    dimension: a.dimension.map((value, i) => value + (b.dimension[i] ?? 0) * power) as unknown as DimensionExponents,
  };
}

const one: UnitScale = { coefficient: 1, exponent: 0, dimension: [0, 0, 0, 0, 0, 0] };

/** Reads a unit expression such as `N*s/m`, `(m/s^2)^2/Hz` or `kg m^-3`; a string names what was not understood. */
function readUnit(text: string, gravity: boolean): UnitScale | string {
  const tokens = text.match(/\^\s*[+-]?\d+|[A-Za-zμΩ°%"]+|[()*·×/]|\d+(?:\.\d+)?|\S/g) ?? [];
  let at = 0;
  const product = (depth: number): UnitScale | string => {
    let total: UnitScale = one;
    let sign = 1;
    let expectFactor = true;
    while (at < tokens.length) {
      const token = tokens[at] ?? '';
      if (token === ')') break;
      at += 1;
      if (token === '*' || token === '·' || token === '×' || token === '/') {
        if (expectFactor) return token;
        sign = token === '/' ? -1 : 1;
        expectFactor = true;
        continue;
      }
      let factor: UnitScale | string;
      if (token === '(') {
        if (depth > 3) return '(';
        factor = product(depth + 1);
        if (typeof factor === 'string') return factor;
        if (tokens[at] !== ')') return '(';
        at += 1;
      } else if (token === '1' && total === one) {
        factor = one;
      } else {
        factor = unitOf(token, gravity) ?? token;
        if (typeof factor === 'string') return factor;
      }
      const power = /^\^\s*([+-]?\d+)$/.exec(tokens[at] ?? '');
      if (power) at += 1;
      const exponent = power ? Number(power[1]) : 1;
      if (Math.abs(exponent) > 9) return power?.[0] ?? '^';
      total = multiply(total, factor, sign * exponent);
      sign = 1;
      expectFactor = false;
    }
    return expectFactor ? (text === '' ? one : text) : total;
  };
  const result = product(0);
  return typeof result === 'string' || at === tokens.length ? result : (tokens[at] ?? text);
}

const quoted = (text: string): string => `“${text.length > 40 ? `${text.slice(0, 40)}…` : text}”`;

function examplesOf(dimension: Dimension): string {
  const description: DimensionDescription = dimensions[dimension];
  const { examples } = description;
  return examples.length > 1
    ? `${examples.slice(0, -1).join(', ')} or ${examples[examples.length - 1] ?? ''}`
    : (examples[0] ?? '');
}

const refuse = (text: string, dimension: Dimension, why: string): QuantityReading => ({
  ok: false,
  message: `${quoted(text)} is not understood as ${dimensions[dimension].phrase}: ${why}. Write for example ${examplesOf(dimension)}.`,
});

/** What is wrong with the shape of the number, where a common habit explains it. */
function numberProblem(text: string): string {
  if (/^[+-]?\d+,\d/.test(text)) {
    return `the comma could part thousands or decimals, so it is not guessed; write a decimal point (${text.replace(/^([+-]?\d+),(\d+)/, '$1.$2')})`;
  }
  if (/^[+-]?,\d/.test(text)) return 'write a decimal point, not a comma';
  if (text === '') return 'it is empty';
  return 'it does not start with a number';
}

function readTemperature(number: number, unit: string): number | undefined {
  if (/^(°C|degC|C|celsius|Celsius|deg C|° C)?$/.test(unit)) return number;
  if (/^(°F|degF|deg F|° F)$/.test(unit)) return ((number - 32) * 5) / 9;
  if (/^(K|kelvin)$/.test(unit)) return Number((number - 273.15).toPrecision(15));
  return undefined;
}

/** Scales in decimal text where it can, so that 0.47 in is 0.011938 and not its neighbour. */
function scaledValue(digits: string, power: number, scale: UnitScale): number {
  if (scale.coefficient === 1) return Number(`${digits}e${power + scale.exponent}`);
  const product = String(Number(`${digits}e${power}`) * scale.coefficient);
  return /^[-.\d]+$/.test(product) ? Number(`${product}e${scale.exponent}`) : Number(product) * 10 ** scale.exponent;
}

const bareMultipliers: Partial<Record<Dimension, { unit: string; letters: RegExp }>> = {
  resistance: { unit: 'ohm', letters: /^[RrkKMG]$/ },
  capacitance: { unit: 'F', letters: /^[pnuμm]$/ },
  inductance: { unit: 'H', letters: /^[pnuμm]$/ },
};

/** Turns "4k7" into number text and unit text; undefined where the text is not a letter code of this dimension. */
function readLetterCode(text: string, dimension: Dimension): { number: string; unit: string } | undefined {
  const bare = bareMultipliers[dimension];
  const match = bare ? letterCode.exec(text) : null;
  if (!bare || !match) return undefined;
  const [, sign = '', whole = '', letter = '', fraction = '', rest = ''] = match;
  const own = letter === 'R' || letter === 'r' || letter === bare.unit;
  if (!own && !bare.letters.test(letter)) return undefined;
  const tail = rest.trim();
  if (tail !== '' && tail !== bare.unit && tail !== 'Ω') return undefined;
  return { number: `${sign}${whole}.${fraction}`, unit: own ? bare.unit : `${letter}${bare.unit}` };
}

/**
 * Reads what an engineer types into a field: `12 mm`, `0.47 in`, `4k7`, `1.2e-3 m`, `20 degC`, or a plain SI number.
 * `g` is standard gravity in accelerations and the gram elsewhere. A comma is never guessed at.
 * @param text one quantity.
 * @param dimension what the field holds.
 * @param bareUnit unit taken where none is written; the SI unit by default (°C for temperatures, rad for angles).
 * @returns the SI value (°C for temperatures), or a message naming the text, what was expected and examples.
 */
export function parseQuantity(text: string, dimension: Dimension, bareUnit = ''): QuantityReading {
  const cleaned = clean(text);
  if (cleaned.length > longestText) return refuse(cleaned, dimension, 'it is too long for one quantity');
  const coded = readLetterCode(cleaned, dimension);
  let digits: string;
  let unitText: string;
  let power: number;
  if (coded) {
    digits = coded.number;
    unitText = coded.unit;
    power = 0;
  } else {
    const match = numberPattern.exec(cleaned);
    const rest = match ? cleaned.slice(match[0].length) : cleaned;
    if (!match || rest.startsWith(',')) return refuse(cleaned, dimension, numberProblem(cleaned));
    const times = timesTenPattern.exec(rest);
    digits = `${match[1] ?? ''}${match[2] ?? ''}`;
    power = Number(match[3] ?? 0) + Number(times?.[1] ?? 0);
    unitText = (times ? rest.slice(times[0].length) : rest).trim();
    const bare = bareMultipliers[dimension];
    if (bare && bare.letters.test(unitText)) unitText = /[Rr]/.test(unitText) ? bare.unit : `${unitText}${bare.unit}`;
  }
  if (unitText === '') unitText = clean(bareUnit);
  if (/^[.\d]/.test(unitText) && !/^1\s*\//.test(unitText)) {
    return refuse(cleaned, dimension, 'digits parted by spaces or dots are not joined; write one number');
  }
  if (dimension === 'temperature') {
    const celsius = readTemperature(Number(`${digits}e${power}`), unitText);
    if (celsius === undefined)
      return refuse(cleaned, dimension, `the unit ${quoted(unitText)} is not one of temperature`);
    return { ok: true, value: celsius + 0 };
  }
  let scale: UnitScale = { ...one, dimension: dimensions[dimension].exponents };
  if (unitText !== '') {
    const read = readUnit(unitText, isGravity(dimension));
    if (typeof read === 'string') return refuse(cleaned, dimension, `the unit ${quoted(read)} is not known`);
    scale = read;
  }
  const wanted = dimensions[dimension].exponents;
  if (!wanted.every((value, index) => value === scale.dimension[index])) {
    const found = dimensionWith(scale.dimension);
    return refuse(
      cleaned,
      dimension,
      found ? `${quoted(unitText)} measures ${dimensions[found].phrase}` : `${quoted(unitText)} has another dimension`,
    );
  }
  const value = scaledValue(digits, power, scale);
  if (!Number.isFinite(value)) return refuse(cleaned, dimension, 'it is too large to be a number');
  return { ok: true, value: value + 0 };
}
