/** Amounts in section 3 as sheets print them: "30-60%", "≥10 - ≤20", "10 - <25", "< 1.0", "balance" is none. */

const mark = '(?:[<>≤≥~≈]=?|=<|=>|ca\\.?|approx\\.?|about|max\\.?|up to|at least|at most|more than|less than|greater than|not more than|mas de|menos de|hasta|plus de|moins de|jusqu.a|uber|unter|bis zu|min\\.?)';
const figure = '(?:\\d{1,3}(?:[.,]\\d{1,6})?|[.,]\\d{1,6})';
const unit = '(?:\\s?(?:%|wt\\.?\\s?%?|w\\/w|vol\\.?\\s?%?|percent)(?:\\s?\\(?(?:w\\/w|w\\/v|v\\/v|by (?:wt|weight|vol|volume)\\.?|wt\\.?|vol\\.?|weight)\\)?)?)';
const dash = '(?:-|\\u2010|\\u2011|\\u2012|–|—|−|to|a|bis|à|and|y|und|et|\\.\\.\\.?|…)';
const letter = `${figure}\\s?%?\\s?[<≤]=?\\s?(?:x|c|conc\\.?)\\s?%?\\s?[<≤]=?\\s?${figure}\\s?%?`;
const amount = `(?:${mark}\\s?)?${figure}${unit}?(?:\\s?${dash}\\s?(?:${mark}\\s?)?${figure}${unit}?)?`;
const whole = new RegExp(`^\\(?\\s?(${letter}|${amount})\\s?\\)?$`, 'i');
const rangeInside = new RegExp(`(?<![\\d.,/-])(?:${mark}\\s?)?${figure}${unit}?\\s?(?:-|–|—|−|to|bis)\\s?(?:${mark}\\s?)?${figure}${unit}?(?![\\d/-]|\\s?(?:ppm|mg|µg|ug|°|ppb))`, 'i');
const percentInside = new RegExp(`(?<![\\d.,/-])(?:${mark}\\s?)?${figure}\\s?%(?:\\s?${dash}\\s?(?:${mark}\\s?)?${figure}\\s?%?)?`, 'i');
const percentRangeInside = new RegExp(`(?<![\\d.,/-])(?:${mark}\\s?)?${figure}${unit}?\\s?${dash}\\s?(?:${mark}\\s?)?${figure}\\s?%`, 'i');

/** The text as an amount when it is nothing but one, at most 100; null otherwise. */
export function wholeConcentration(text: string): string | null {
  const match = whole.exec(text.trim().replace(/\s*(trade secret|withheld|proprietary)?\s*[*†‡]*$/i, ''));
  return match?.[1] && isShare(match[1]) ? match[1].trim() : null;
}

/** The amount inside a longer text: with a percent sign, or as a range. */
export function concentrationIn(text: string): string | null {
  const match = percentRangeInside.exec(text) ?? percentInside.exec(text) ?? rangeInside.exec(text);
  return match && isShare(match[0]) ? match[0].trim() : null;
}

/** Shares lie between 0 and 100 and do not fall. */
function isShare(text: string): boolean {
  const figures = (text.match(/\d*[.,]?\d+/g) ?? []).map((part) => Number(part.replace(',', '.')));
  const [low = 0, high = low] = figures;
  return figures.length >= 1 && figures.length <= 2 && figures.every((share) => share >= 0 && share <= 100) && (figures.length === 1 || high >= low);
}
