import type { Definition } from "@/lib/calculation/definition";

export const categoryNames: Record<Definition["category"], string> = {
  walls: "Walls",
  pipes: "Pipes and vessels",
  joints: "Joints and spreading",
  fins: "Fins",
  shapes: "Ground and shapes",
  transient: "Transient",
  materials: "Materials",
};
