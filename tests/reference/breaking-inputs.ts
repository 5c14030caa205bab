import type { GivenInputs } from "@/lib/calculation/evaluation";
import { given } from "./shelf";

/** For each limit of each template: inputs that break it and inputs that do not, both near the bound where that is easy. */
export const breaking: Readonly<
  Record<string, Readonly<Record<string, { readonly breaks: GivenInputs; readonly holds: GivenInputs }>>>
> = {
  "stud-wall": {
    "limits-apart": {
      breaks: { layers: [{ t: 200, k_field: 0.02, k_frame: 4 }], f: 0.1 },
      holds: {},
    },
    "metal-framing": {
      breaks: { layers: [{ t: 100, k_field: 0.035, k_frame: 50 }] },
      holds: { layers: [{ t: 100, k_field: 0.035, k_frame: 5 }] },
    },
  },
  "furnace-lining": {
    "shell-temperature": { breaks: { T_allow: 60 }, holds: { T_allow: 250 } },
  },
  "insulated-pipe": {
    "surface-temperature": { breaks: { T_allow: 25 }, holds: { T_allow: given(140, "°F") } },
    "below-ambient": { breaks: { T_fluid: -20 }, holds: { T_fluid: 20, T_amb: 20 } },
  },
  "pipe-surface-balance": {
    "surface-temperature": { breaks: { t: 0 }, holds: { T_allow: 150 } },
    "below-ambient": { breaks: { T_pipe: 10, T_amb: 20 }, holds: {} },
    "rayleigh-range": {
      breaks: { D: 9000, t: 0, T_pipe: 300, T_allow: 400 },
      holds: { D: 500, t: 0, T_pipe: 300, T_allow: 400 },
    },
    "peclet-range": {
      breaks: { D: 1, t: 0, v: 0.0005, T_pipe: 50 },
      holds: { D: 1, t: 0, v: 0, T_pipe: 50 },
    },
  },
  "economic-thickness": {
    "end-of-range": { breaks: { t_max: 50 }, holds: {} },
  },
  "contact-conductance": {
    "load-range": { breaks: { P: 1, H: 0.04 }, holds: { P: 2.3, H: 0.1 } },
  },
  "device-stack": {
    "area-step": {
      breaks: {},
      holds: {
        layers: [
          { t: 1, k: 100, A: 1.2, R_c: 0 },
          { t: 1, k: 100, A: 1, R_c: 0 },
        ],
      },
    },
  },
  "straight-fin": { "thin-fin": { breaks: { h: 25000, t: 2 }, holds: { h: 20000, t: 2 } } },
  "pin-fin": { "thin-fin": { breaks: { h: 9000, D: 5 }, holds: { h: 8000, D: 5 } } },
  "annular-fin": { "thin-fin": { breaks: { h: 50000, t: 1 }, holds: { h: 40000, t: 1 } } },
  "triangular-fin": { "thin-fin": { breaks: { h: 14000, t: 3 }, holds: { h: 13000, t: 3 } } },
  "fin-array": { "thin-fin": { breaks: { h: 50000, t: 1 }, holds: { h: 40000, t: 1 } } },
  "box-furnace": {
    "thick-wall": { breaks: { a: 0.03, t: 200 }, holds: { a: 0.04, t: 200 } },
  },
  "lumped-cooldown": {
    biot: { breaks: { k: 0.1 }, holds: {} },
    radiation: { breaks: { T_0: 201, h: 29 }, holds: { T_0: 500, h: 30 } },
  },
  "thick-body-step": {
    "far-side": { breaks: { b: 500 }, holds: { b: 600 } },
  },
  "wall-step": { "early-time": { breaks: { time: 0.1 }, holds: { time: 0 } } },
  "cylinder-step": { "early-time": { breaks: { time: 0.1 }, holds: { time: 0 } } },
  "sphere-step": { "early-time": { breaks: { time: 0.1 }, holds: { time: 0 } } },
  "electronic-share": {
    "lorenz-ratio": { breaks: { k: 350 }, holds: {} },
  },
};

/** For each relation of inputs, in the order of the template's `requires`: inputs that break it. */
export const brokenRelations: Readonly<Record<string, readonly GivenInputs[]>> = {
  "linear-k-wall": [{ b: -0.004 }, { b: 0.04, T_cold: -10 }],
  "pipe-wall": [{ D_in: 60 }],
  "touch-limit-thickness": [{ T_limit: 25 }],
  "economic-thickness": [{ T_pipe: 15 }],
  "spherical-shell": [{ D_in: 600 }],
  "disc-spreading": [{ a: 25.1 }],
  "annular-fin": [{ r_2: 12.5 }],
  "fin-array": [{ S: 0.9 }, { N: 10.5 }],
  "buried-pipe": [{ z: 0.1 }],
  "twin-pipes": [{ w: 200 }],
  "eccentric-pipe": [{ d: 150, z: 0 }, { z: 50 }],
  "wall-step": [{ x: 25.1 }],
  "cylinder-step": [{ r: 25.1 }],
  "sphere-step": [{ r: 25.1 }],
  "freezing-front": [{ T_s: 0 }],
};
