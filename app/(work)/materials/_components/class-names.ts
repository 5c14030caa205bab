import type { MaterialClass } from "@/lib/calculation/material";

export const classNames: Record<MaterialClass, string> = {
  metal: "Metals",
  refractory: "Refractories",
  masonry: "Masonry",
  insulation: "Insulation",
  polymer: "Polymers",
  liquid: "Liquids",
  gas: "Gases",
  other: "Other",
};

/** What a property's symbol stands for. */
export const propertyLabels: Record<string, string> = {
  k: "Thermal conductivity",
  k_along: "Thermal conductivity, along",
  k_across: "Thermal conductivity, across",
  rho: "Density",
  c: "Specific heat capacity",
  eps: "Emissivity",
  rho_e: "Electrical resistivity",
  mu: "Dynamic viscosity",
};
