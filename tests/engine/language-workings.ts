import type { ProgramSource } from "@/lib/language";
import { choice, material, number, sourceOf, table, text } from "./language-inputs";

/**
 * Eight of the hardest workings of the shelf with their inputs, results and limits, in one place: each must check
 * without an error, a warning or a remark.
 */
export const workings: Readonly<Record<string, ProgramSource>> = {
  "wall-step": sourceOf({
    inputs: [
      number("L", "length", "mm"),
      number("x", "length", "mm"),
      number("k", "thermal conductivity", "W/(m·K)"),
      number("rho", "density", "kg/m³"),
      number("c", "specific heat capacity", "J/(kg·K)"),
      number("h", "heat transfer coefficient", "W/(m²·K)"),
      number("T_0", "temperature", "°C"),
      number("T_inf", "temperature", "°C"),
      number("time", "time", "s"),
    ],
    working: `a = k/(rho*c)
Bi = h*L/k
Fo = a*time/L^2
zeta(n) = balance(u, (n - 1)*pi, (n - 1/2)*pi, u*sin(u) - Bi*cos(u))
term(z) = 4*sin(z)/(2*z + sin(2*z))*exp(-z^2*Fo)*cos(z*x/L)
part(z) = 2*Bi^2/(z^2*(z^2 + Bi + Bi^2))*exp(-z^2*Fo)
theta = Fo > 0 ? series(n, 1, 24, term(zeta(n))) : 1
T = T_inf + theta*(T_0 - T_inf)
fraction = Fo > 0 ? 1 - series(n, 1, 24, part(zeta(n))) : 0`,
    requires: ["x <= L"],
    limits: ["Fo > 0 and Fo < 0.005"],
    results: [
      ["Bi", "ratio", "1"],
      ["Fo", "ratio", "1"],
      ["theta", "ratio", "1"],
      ["T", "temperature", "°C"],
      ["fraction", "ratio", "1"],
    ],
    appliesWhen: {},
  }),
  "cylinder-step": sourceOf({
    inputs: [
      number("r_o", "length", "mm"),
      number("r", "length", "mm"),
      number("k", "thermal conductivity", "W/(m·K)"),
      number("rho", "density", "kg/m³"),
      number("c", "specific heat capacity", "J/(kg·K)"),
      number("h", "heat transfer coefficient", "W/(m²·K)"),
      number("T_0", "temperature", "°C"),
      number("T_inf", "temperature", "°C"),
      number("time", "time", "s"),
    ],
    working: `a = k/(rho*c)
Bi = h*r_o/k
Fo = a*time/r_o^2
zeta(n) = balance(u, n == 1 ? 0 : bessel_j_zero(1, n - 1), bessel_j_zero(0, n), u*bessel_j(1, u) - Bi*bessel_j(0, u))
term(z) = (2*bessel_j(1, z)/(z*(bessel_j(0, z)^2 + bessel_j(1, z)^2))
           *exp(-z^2*Fo)*bessel_j(0, z*r/r_o))
part(z) = 4*Bi^2/(z^2*(z^2 + Bi^2))*exp(-z^2*Fo)
theta = Fo > 0 ? series(n, 1, 24, term(zeta(n))) : 1
T = T_inf + theta*(T_0 - T_inf)
fraction = Fo > 0 ? 1 - series(n, 1, 24, part(zeta(n))) : 0`,
    requires: ["r <= r_o"],
    limits: ["Fo > 0 and Fo < 0.005"],
    results: [
      ["Bi", "ratio", "1"],
      ["Fo", "ratio", "1"],
      ["theta", "ratio", "1"],
      ["T", "temperature", "°C"],
      ["fraction", "ratio", "1"],
    ],
    appliesWhen: {},
  }),
  "furnace-lining": sourceOf({
    inputs: [
      number("A", "area", "m²"),
      number("T_hot", "temperature", "°C"),
      number("T_amb", "temperature", "°C"),
      number("h_c", "heat transfer coefficient", "W/(m²·K)"),
      number("eps", "emissivity", "1"),
      number("T_allow", "temperature", "°C"),
      table("layers", [text("name"), number("t", "length", "mm"), material("material", ["k"])]),
    ],
    working: `h_r(s) = eps*sigma_SB*(s^2 + T_amb^2)*(s + T_amb)
k_between(f) = layers.material.k_mean(drop_last(f), drop_first(f))
flux(f) = (T_hot - T_amb)/(sum(layers.t/k_between(f)) + 1/(h_c + h_r(last(f))))
next(f) = prepend(T_hot - flux(f)*cumsum(layers.t/k_between(f)), T_hot)
start = prepend(T_hot - (T_hot - T_amb)*cumsum(layers.t)/sum(layers.t), T_hot)
T_face = fixed_point(f, start, next(f))
k_eff = k_between(T_face)
q = flux(T_face)
Q = q*A
T_shell = last(T_face)`,
    requires: [],
    limits: ["T_shell > T_allow"],
    results: [
      ["q", "heat flux", "W/m²"],
      ["Q", "heat flow rate", "W"],
      ["T_shell", "temperature", "°C"],
      ["T_face", "temperature", "°C", "list"],
      ["k_eff", "thermal conductivity", "W/(m·K)", "list"],
    ],
    appliesWhen: {},
  }),
  "pipe-surface-balance": sourceOf({
    inputs: [
      number("D", "length", "mm"),
      number("t", "length", "mm"),
      material("insulation", ["k"]),
      material("air", ["k", "mu", "c"]),
      number("T_pipe", "temperature", "°C"),
      number("T_amb", "temperature", "°C"),
      number("v", "velocity", "m/s"),
      number("eps", "emissivity", "1"),
      number("T_allow", "temperature", "°C"),
    ],
    working: `D_o = D + 2*t
film(s) = (s + T_amb)/2
nu_air(s) = air.mu(s)*R_gas*s/("101325 Pa"*"28.9644 g/mol")
Pr_air(s) = air.mu(s)*air.c(s)/air.k(s)
Ra_at(s) = g_n*abs(s - T_amb)*D_o^3*Pr_air(film(s))/(film(s)*nu_air(film(s))^2)
Re_at(s) = v*D_o/nu_air(film(s))
Nu_n(ra, p) = (0.6 + 0.387*ra^(1/6)/(1 + (0.559/p)^(9/16))^(8/27))^2
Nu_f(re, p) = 0.3 + 0.62*sqrt(re)*p^(1/3)/(1 + (0.4/p)^(2/3))^(1/4)*(1 + (re/282000)^(5/8))^(4/5)
conv(s) = air.k(film(s))/D_o*max(Nu_n(Ra_at(s), Pr_air(film(s))), v > 0 ? Nu_f(Re_at(s), Pr_air(film(s))) : 0)
rad(s) = eps*sigma_SB*(s^2 + T_amb^2)*(s + T_amb)
given(s) = pi*D_o*(conv(s) + rad(s))*(s - T_amb)
through(s) = 2*pi*insulation.k_integral(s, T_pipe)/ln(D_o/D)
T_surface = (t == 0 ? T_pipe
  : balance(s, min(T_pipe, T_amb), max(T_pipe, T_amb), through(s) - given(s)))
h_c = conv(T_surface)
h_r = rad(T_surface)
q_l = pi*D_o*(h_c + h_r)*(T_surface - T_amb)
k_mean = insulation.k_mean(T_pipe, T_surface)
Ra = Ra_at(T_surface)                              # for the limits
RePr = Re_at(T_surface)*Pr_air(film(T_surface))    # for the limits`,
    requires: [],
    limits: ["T_surface > T_allow", "Ra > 1e12 or (v > 0 and RePr < 0.2)"],
    results: [
      ["q_l", "linear heat flow rate", "W/m"],
      ["T_surface", "temperature", "°C"],
      ["h_c", "heat transfer coefficient", "W/(m²·K)"],
      ["h_r", "heat transfer coefficient", "W/(m²·K)"],
      ["k_mean", "thermal conductivity", "W/(m·K)"],
    ],
    appliesWhen: {},
  }),
  "economic-thickness": sourceOf({
    inputs: [
      number("D", "length", "mm"),
      number("k", "thermal conductivity", "W/(m·K)"),
      number("T_pipe", "temperature", "°C"),
      number("T_amb", "temperature", "°C"),
      number("h_out", "heat transfer coefficient", "W/(m²·K)"),
      number("hours", "time", "h"),
      number("price", "energy price", "EUR/MWh"),
      number("eta", "ratio", "1"),
      number("c_vol", "volumetric cost", "EUR/m³"),
      number("c_area", "cost per area", "EUR/m²"),
      number("annuity", "ratio", "1"),
      number("t_max", "length", "mm"),
    ],
    working: `cost_area(s) = s > 0 ? annuity*c_area*pi*(D + 2*s) : 0
loss(s) = (T_pipe - T_amb)/(ln((D + 2*s)/D)/(2*pi*k) + 1/(pi*(D + 2*s)*h_out))
heat(s) = loss(s)*hours*price/eta
lagging(s) = annuity*c_vol*pi/4*((D + 2*s)^2 - D^2)
t = argmin(s, 0, t_max, heat(s) + lagging(s) + cost_area(s))
q_l = loss(t)
cost_heat = heat(t)
cost_ins = lagging(t) + cost_area(t)
cost_total = cost_heat + cost_ins`,
    requires: ["T_pipe > T_amb"],
    limits: ["t >= t_max"],
    results: [
      ["t", "length", "mm"],
      ["q_l", "linear heat flow rate", "W/m"],
      ["cost_heat", "linear cost", "EUR/m"],
      ["cost_ins", "linear cost", "EUR/m"],
      ["cost_total", "linear cost", "EUR/m"],
    ],
    appliesWhen: {},
  }),
  "annular-fin": sourceOf({
    inputs: [
      number("r_1", "length", "mm"),
      number("r_2", "length", "mm"),
      number("t", "length", "mm"),
      number("k", "thermal conductivity", "W/(m·K)"),
      number("h", "heat transfer coefficient", "W/(m²·K)"),
      number("T_b", "temperature", "°C"),
      number("T_inf", "temperature", "°C"),
      choice("tip", ["adiabatic", "corrected"]),
    ],
    working: `r_2c = tip == "corrected" ? r_2 + t/2 : r_2
m = sqrt(2*h/(k*t))
a = m*r_1
b = m*r_2c
s = exp(-2*(b - a))
up = bessel_ke(1, a)*bessel_ie(1, b) - bessel_ie(1, a)*bessel_ke(1, b)*s
down = bessel_ke(0, a)*bessel_ie(1, b) + bessel_ie(0, a)*bessel_ke(1, b)*s
eta = 2*r_1/(m*(r_2c^2 - r_1^2))*up/down
Q = eta*h*2*pi*(r_2c^2 - r_1^2)*(T_b - T_inf)
T_tip = T_inf + (T_b - T_inf)*exp(a - b)/(b*down)  # Wronskian
Bi_t = h*(t/2)/k                                   # for the limit`,
    requires: ["r_2 > r_1"],
    limits: ["Bi_t > 0.1"],
    results: [
      ["eta", "ratio", "1"],
      ["Q", "heat flow rate", "W"],
      ["T_tip", "temperature", "°C"],
    ],
    appliesWhen: {},
  }),
  "device-stack": sourceOf({
    inputs: [
      number("P", "heat flow rate", "W"),
      number("T_amb", "temperature", "°C"),
      number("R_sink", "thermal resistance", "K/W"),
      table("layers", [
        text("name"),
        number("t", "length", "mm"),
        number("k", "thermal conductivity", "W/(m·K)"),
        number("A", "area", "cm²"),
        number("R_c", "thermal insulance", "mm²·K/W"),
      ]),
    ],
    working: `R_row = layers.t/(layers.k*layers.A) + layers.R_c/layers.A
R_total = sum(R_row) + R_sink
T_device = T_amb + P*R_total
T_node = prepend(T_device - P*cumsum(R_row), T_device)`,
    requires: [],
    limits: ["min(layers.A) < 0.8*max(layers.A)"],
    results: [
      ["R_total", "thermal resistance", "K/W"],
      ["T_device", "temperature", "°C"],
      ["T_node", "temperature", "°C", "list"],
    ],
    appliesWhen: {},
  }),
  "thick-body-step": sourceOf({
    inputs: [
      number("k", "thermal conductivity", "W/(m·K)"),
      number("rho", "density", "kg/m³"),
      number("c", "specific heat capacity", "J/(kg·K)"),
      number("x", "length", "mm"),
      number("time", "time", "h"),
      number("T_0", "temperature", "°C"),
      choice("case", ["surface_temperature", "surface_flux", "convection"]),
      number("T_s", "temperature", "°C"),
      number("q_s", "heat flux", "W/m²"),
      number("h", "heat transfer coefficient", "W/(m²·K)"),
      number("b", "length", "mm"),
    ],
    working: `a = k/(rho*c)
d = sqrt(a*time)
xi = x/(2*d)
H = h*d/k
T = (case == "surface_temperature" ? T_0 + (T_s - T_0)*erfc(xi)
  : case == "surface_flux" ? T_0 + 2*q_s*d/k*(exp(-xi^2)/sqrt(pi) - xi*erfc(xi))
  : T_0 + (T_s - T_0)*(erfc(xi) - exp(-xi^2)*erfcx(xi + H)))
q_surface = (case == "surface_temperature" ? k*(T_s - T_0)/(sqrt(pi)*d)
  : case == "surface_flux" ? q_s
  : h*(T_s - T_0)*erfcx(H))
reach = 4*d                                        # for the limit`,
    requires: [],
    limits: ["reach > b"],
    results: [
      ["a", "thermal diffusivity", "m²/s"],
      ["T", "temperature", "°C"],
      ["q_surface", "heat flux", "W/m²"],
    ],
    appliesWhen: { T_s: 'case != "surface_flux"', q_s: 'case == "surface_flux"', h: 'case == "convection"' },
  }),
};
