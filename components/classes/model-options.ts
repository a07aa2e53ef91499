import type { SelectOption } from "@/components/ui/select";
import type { StoredModel } from "@/lib/schemas/model";
import { typedQuantity } from "./field-words";

/** Models that drive, each with its typical resistance. */
export function driverOptions(models: readonly StoredModel[]): SelectOption[] {
  return models.flatMap(({ lineageId, name, driver }) =>
    driver
      ? [{ value: lineageId, label: `${name} (${typedQuantity(driver.resistance.typical, "resistance")})` }]
      : [],
  );
}

/** Models that receive, each with its typical capacitance. */
export function receiverOptions(models: readonly StoredModel[]): SelectOption[] {
  return models.flatMap(({ lineageId, name, receiver }) =>
    receiver
      ? [
          {
            value: lineageId,
            label: `${name} (${typedQuantity(receiver.capacitance.typical, "capacitance")})`,
          },
        ]
      : [],
  );
}

export function modelOptions(models: readonly StoredModel[]): SelectOption[] {
  return models.map(({ lineageId, name }) => ({ value: lineageId, label: name }));
}
