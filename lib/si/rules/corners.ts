import { DomainError } from "../errors";
import type { Corner, CornerName, DriverSpeed, ImpedanceSide } from "./types";

export const driverSpeeds: readonly DriverSpeed[] = ["slow", "typical", "fast"];
export const impedanceSides: readonly ImpedanceSide[] = ["low", "nominal", "high"];

/** Three driver speeds by three impedance sides. */
export const allCorners: readonly Corner[] = driverSpeeds.flatMap((driver) =>
  impedanceSides.map((impedance) => ({ driver, impedance })),
);

export function cornerName({ driver, impedance }: Corner): CornerName {
  return `${driver}/${impedance}`;
}

export const NOMINAL: CornerName = "typical/nominal";

/** The corner a name such as "fast/low" stands for. */
export function parseCorner(name: string): Corner {
  const found = allCorners.find((corner) => cornerName(corner) === name);
  if (!found)
    throw new DomainError(
      `"${name}" is not a corner. Write a driver speed and an impedance side, such as fast/low.`,
      "corner",
    );
  return found;
}
