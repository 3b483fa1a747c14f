import { expect, test } from "vitest";
import {
  celsiusFromKelvin,
  fractionFromPercent,
  kelvinFromCelsius,
  metresFromMm,
  mmFromMetres,
} from "./units.ts";

// The kelvin's definition: 0 °C = 273.15 K.
test("conversions go both ways", () => {
  expect(metresFromMm(50)).toBe(0.05);
  expect(mmFromMetres(0.05)).toBe(50);
  expect(kelvinFromCelsius(20)).toBe(293.15);
  expect(celsiusFromKelvin(273.15)).toBe(0);
  expect(fractionFromPercent(0.2)).toBe(0.002);
});
