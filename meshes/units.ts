/** THE conversions between the documents' millimetres and degrees Celsius and the solver's SI units, both ways. */

const MM_PER_METRE = 1000;
const ZERO_CELSIUS_IN_KELVIN = 273.15;

/** mm → m. Divides, since 1/1000 has no exact binary form: 50 mm is the double nearest to 0.05 m. */
export const metresFromMm = (mm: number): number => mm / MM_PER_METRE;
/** m → mm. */
export const mmFromMetres = (metres: number): number => metres * MM_PER_METRE;

/** °C → K. */
export const kelvinFromCelsius = (celsius: number): number => celsius + ZERO_CELSIUS_IN_KELVIN;
/** K → °C. */
export const celsiusFromKelvin = (kelvin: number): number => kelvin - ZERO_CELSIUS_IN_KELVIN;

/** % → fraction. */
export const fractionFromPercent = (percent: number): number => percent / 100;
