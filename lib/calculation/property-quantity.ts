import type { PropertyName } from "@/lib/language";

/** Quantity of each material property: its dimension, and its name for people. */
export const propertyQuantities: Readonly<Record<PropertyName, string>> = {
  k: "thermal conductivity",
  k_along: "thermal conductivity",
  k_across: "thermal conductivity",
  rho: "mass density",
  c: "specific heat capacity",
  eps: "emissivity",
  rho_e: "electrical resistivity",
  mu: "dynamic viscosity",
};
