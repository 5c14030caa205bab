"""Values of worked cases that are marked "computed independently", by other means than the templates' closed forms.

Not run by the tests (it needs numpy, scipy and mpmath); it is kept so that the values can be traced and made again:
    python3 tests/reference/independent.py
"""

import mpmath as mp
import numpy as np
from scipy.integrate import quad, solve_ivp
from scipy.linalg import solve_banded
from scipy.optimize import brentq, minimize_scalar

SIGMA, ICE = 5.670374419e-8, 273.15


def linear_k_wall(k_ref, b, t_ref, hot, cold, thickness):
    """Mean conductivity, flux and middle temperature by quadrature of k(T) and root finding."""
    k = lambda T: k_ref * (1 + b * (T - t_ref))
    whole = quad(k, cold, hot, epsabs=1e-12)[0]
    middle = brentq(lambda T: quad(k, cold, T, epsabs=1e-13)[0] - whole / 2, cold, hot, xtol=1e-13)
    return whole / (hot - cold), whole / thickness, middle


def generation(shape, extent, k, g, h, coolant, n=400):
    """Surface and centre temperature and surface flux by finite volumes; shape 0 plane, 1 cylinder."""
    dx = extent / n
    edge = np.arange(n + 1) * dx
    area, volume = edge**shape, (edge[1:] ** (shape + 1) - edge[:-1] ** (shape + 1)) / (shape + 1)
    inner = k * area[1:-1] / dx
    outer = area[-1] / (dx / 2 / k + 1 / h)
    band, diagonal = np.zeros((3, n)), np.zeros(n)
    diagonal[:-1] += inner
    diagonal[1:] += inner
    diagonal[-1] += outer
    band[0, 1:], band[1], band[2, :-1] = -inner, diagonal, -inner
    right = g * volume
    right[-1] += outer * coolant
    T = solve_banded((1, 1), band, right)
    flux = outer * (T[-1] - coolant) / area[-1]
    return coolant + flux / h, T[0] + g * (dx / 2) ** 2 / (2 * (shape + 1) * k), flux


def fin(length, k, h, area, perimeter, start=0.0, tip=0.0):
    """Heat from the base and tip ratio for a base excess of 1, by integrating the fin equation from the tip."""
    f = lambda x, y: [y[1] / (k * area(x)), h * perimeter(x) * y[0]]
    end = start + length
    s = solve_ivp(f, (end, start), [1.0, -tip * area(end)], method="DOP853", rtol=1e-13, atol=1e-15)
    return -s.y[1, -1] / s.y[0, -1], 1 / s.y[0, -1]


def constant(value):
    return lambda _: value


def annular(r_1, r_2, t, k, h):
    q, tip = fin(r_2 - r_1, k, h, lambda r: 2 * np.pi * r * t, lambda r: 4 * np.pi * r, start=r_1)
    return q / (h * 2 * np.pi * (r_2**2 - r_1**2)), q, tip


def array(N, L, t, w, S, k, h):
    q, _ = fin(L + t / 2, k, h, constant(w * t), constant(2 * w))
    return q / (h * 2 * w * (L + t / 2)), N * q + h * N * (S - t) * w


def fireclay(T):
    return np.interp(T, [478, 922, 1478], [1, 1.5, 1.8])


def insulating_brick(T):
    return np.interp(T, [300, 673.15, 1273.15, 1533.15], [0.1, 0.14, 0.2, 0.24])


def lining(hot, ambient, h_c, eps, layers):
    """Flux and faces in °C: conductivity integrated from the hot face, flux by root finding on the shell."""

    def faces(q):
        found, T = [hot], hot
        for thickness, k, kinks in layers:
            def missing(T2, T=T, k=k, kinks=kinks, thickness=thickness):
                between = [b for b in kinks if T2 < b < T] or None
                return quad(k, T2, T, points=between, epsabs=1e-10, epsrel=1e-12, limit=400)[0] - q * thickness
            T = brentq(missing, 1.0, T, xtol=1e-11)
            found.append(T)
        return found

    def unbalanced(q):
        try:
            shell = faces(q)[-1]
        except ValueError:
            return -1e9
        return h_c * (shell - ambient) + eps * SIGMA * (shell**4 - ambient**4) - q

    high = 10.0
    while unbalanced(high) > 0:
        high *= 1.5
    q = brentq(unbalanced, 1e-3, high, xtol=1e-10, rtol=1e-14)
    return q, [T - ICE for T in faces(q)]


def air(T):
    """k, mu, c of dry air; c by numerical derivative of the ideal-gas Helmholtz function of Lemmon et al. (2000)."""
    y = T / 132.52
    C = [33.9729025, -164.702679, 262.108546, -21.5346955, -443.455815, 607.339582, -368.790121, 111.296674, -13.4122465]
    k = 4.358e-3 * sum(c * y ** ((i - 3) / 3) for i, c in enumerate(C))
    mu = 1.458e-6 * T**1.5 / (T + 110.4)
    t = mp.mpf(132.6312 / T)
    N = [0.605719400e-7, -0.210274769e-4, -0.158860716e-3, -0.195363420e-3, 2.490888032, 0.791309509, 0.212236768, -0.197938904]
    a = lambda t: (
        N[0] * t**-3 + N[1] * t**-2 + N[2] / t + N[3] * t**1.5 + N[4] * mp.log(t)
        + N[5] * mp.log(1 - mp.exp(-25.36365 * t)) + N[6] * mp.log(1 - mp.exp(-16.90741 * t))
        + N[7] * mp.log(mp.mpf(2) / 3 + mp.exp(87.31279 * t))
    )
    return k, mu, float((1 - t * t * mp.diff(a, t, 2)) * mp.mpf("8.31451") / mp.mpf("0.0289586"))


def pipe_surface(D, t, k, pipe, ambient, wind, eps):
    """Loss per length, surface in °C and both coefficients."""
    Do = D + 2 * t

    def coefficients(s):
        T = (s + ambient) / 2
        k_air, mu, c = air(T)
        nu, Pr = mu * 8.31446261815324 * T / (101325 * 0.0289644), mu * c / k_air
        Ra = 9.80665 * abs(s - ambient) / T * Do**3 / nu**2 * Pr
        Nu = (0.6 + 0.387 * Ra ** (1 / 6) / (1 + (0.559 / Pr) ** (9 / 16)) ** (8 / 27)) ** 2
        if wind > 0:
            Re = wind * Do / nu
            forced = 0.3 + 0.62 * Re**0.5 * Pr ** (1 / 3) / (1 + (0.4 / Pr) ** (2 / 3)) ** 0.25 * (1 + (Re / 282000) ** 0.625) ** 0.8
            Nu = max(Nu, forced)
        return Nu * k_air / Do, eps * SIGMA * (s**4 - ambient**4) / (s - ambient)

    given = lambda s: np.pi * Do * sum(coefficients(s)) * (s - ambient)
    if t == 0:
        surface = pipe
    else:
        through = lambda s: 2 * np.pi * k * (pipe - s) / np.log(Do / D)
        surface = brentq(lambda s: through(s) - given(s), ambient + 1e-9, pipe, xtol=1e-12)
    return given(surface), surface - ICE, *coefficients(surface)


def thickness_for(D, k, pipe, ambient, h, wanted):
    """Thickness in mm and loss, by root finding on the forward network."""
    def loss(t):
        Do = D + 2 * t
        return (pipe - ambient) / (np.log(Do / D) / (2 * np.pi * k) + 1 / (np.pi * Do * h))
    t = brentq(lambda t: ambient + loss(t) / (np.pi * (D + 2 * t) * h) - wanted, 1e-9, 2, xtol=1e-15)
    return t * 1e3, loss(t)


def cheapest(D, k, pipe, ambient, h, hours, price, eta, c_vol, c_area, annuity, t_max):
    """Thickness in mm, loss and both costs: fine grid, then refinement."""
    def costs(t):
        Do = D + 2 * t
        q = (pipe - ambient) / (np.log(Do / D) / (2 * np.pi * k) + 1 / (np.pi * Do * h))
        cover = np.where(t > 0, c_area * np.pi * Do, 0)
        return q * hours * 3600 * price / 3.6e9 / eta, annuity * (c_vol * np.pi / 4 * (Do**2 - D**2) + cover), q
    grid = np.linspace(1e-9, t_max, 3_000_001)
    i = np.argmin(sum(costs(grid)[:2]))
    around = (grid[max(i - 3, 0)], grid[min(i + 3, len(grid) - 1)])
    t = float(minimize_scalar(lambda s: sum(costs(s)[:2]), bounds=around, method="bounded", options={"xatol": 1e-14}).x)
    heat, insulation, q = costs(t)
    return t * 1e3, float(q), float(heat), float(insulation)


def disc(a, b, t, k, h, terms=300):
    """Exact spreading resistance, mean and peak, by Bessel series."""
    ratio, tau, Bi, mean, peak = a / b, t / b, h * b / k, mp.mpf(0), mp.mpf(0)
    for n in range(1, terms + 1):
        z = mp.besseljzero(1, n)
        th = mp.tanh(z * tau)
        phi = (th + z / Bi) / (1 + z / Bi * th)
        j, norm = mp.besselj(1, z * ratio), mp.besselj(0, z) ** 2
        mean += j * j / (z**3 * norm) * phi
        peak += j / (z**2 * norm) * phi
    return float(4 / (mp.pi * k * b * ratio**2) * mean), float(2 / (mp.pi * k * b * ratio) * peak)


def collocation(circles, orders=40, points=160):
    """Shape factor per length between two circles outside each other: logarithms and multipoles fitted on both."""
    angle = np.exp(2j * np.pi * np.arange(points) / points)
    (c1, _, _), (c2, _, _) = circles
    rows, right = [], []
    for centre, radius, potential in circles:
        z = centre + radius * angle
        columns = [np.ones(points), np.log(abs(z - c1)) - np.log(abs(z - c2))]
        for n in range(1, orders + 1):
            for c, r, _ in circles:
                w = ((z - c) / r) ** -n
                columns += [w.real, w.imag]
        rows.append(np.array(columns).T)
        right.append(np.full(points, potential))
    x = np.linalg.lstsq(np.vstack(rows), np.concatenate(right), rcond=1e-14)[0]
    return 2 * np.pi * abs(x[1]) / abs(circles[0][2] - circles[1][2])


def eccentric(d, D, z, orders=60, points=240):
    angle = np.exp(2j * np.pi * np.arange(points) / points)
    rows, right = [], []
    for place, potential in ((z + d / 2 * angle, 1.0), (D / 2 * angle, 0.0)):
        columns = [np.ones(points), np.log(abs(place - z))]
        for n in range(1, orders + 1):
            columns += [(((place - z) / (d / 2)) ** -n).real, ((place / (D / 2)) ** n).real]
        rows.append(np.array(columns).T)
        right.append(np.full(points, potential))
    return 2 * np.pi * abs(np.linalg.lstsq(np.vstack(rows), np.concatenate(right), rcond=1e-14)[0][1])


def stefan(k, rho, c, fusion, subcooling, time):
    """Stefan number, front parameter, depth in mm and flux, in 30 digits."""
    with mp.workdps(30):
        Ste = mp.mpf(c) * subcooling / fusion
        root = mp.findroot(lambda u: mp.sqrt(mp.pi) * u * mp.e ** (u * u) * mp.erf(u) - Ste, mp.sqrt(Ste / 2))
        a = mp.mpf(k) / (rho * c)
        flux = k * subcooling / (mp.erf(root) * mp.sqrt(mp.pi * a * time))
        return float(Ste), float(root), float(2e3 * root * mp.sqrt(a * time)), float(flux)


def oriented(along, across, degrees):
    """Both conductivities at an angle, by rotating and inverting the tensor."""
    u = np.radians(degrees)
    turn = np.array([[np.cos(u), -np.sin(u), 0], [np.sin(u), np.cos(u), 0], [0, 0, 1]])
    K = turn @ np.diag([along, across, across]) @ turn.T
    return float(K[0, 0]), float(1 / np.linalg.inv(K)[0, 0])


def framed_wall(R_si, R_se, f, layers, sideways, slices):
    """Resistance of two columns coupled sideways: 0 gives the upper limit, very strong coupling the lower one."""
    cells = [(t / slices, k) for t, *k in layers for _ in range(slices)]
    n, share = len(cells), (1 - f, f)
    G, right = np.zeros((2 * n, 2 * n)), np.zeros(2 * n)

    def tie(i, j, g):
        G[i, i] += g
        G[j, j] += g
        G[i, j] -= g
        G[j, i] -= g

    for i, (t, k) in enumerate(cells):
        for column in (0, 1):
            me, half = 2 * i + column, t / 2 / k[column]
            if i == 0:
                G[me, me] += share[column] / (R_si + half)
                right[me] += share[column] / (R_si + half)
            if i == n - 1:
                G[me, me] += share[column] / (R_se + half)
            else:
                tie(me, me + 2, share[column] / (half + cells[i + 1][0] / 2 / cells[i + 1][1][column]))
        tie(2 * i, 2 * i + 1, sideways)
    T = np.linalg.solve(G, right)
    first = cells[0]
    return 1 / sum(share[c] * (1 - T[c]) / (R_si + first[0] / 2 / first[1][c]) for c in (0, 1))


def cooldown(steps=20_000):
    """Default lumped body after 30 minutes, Runge-Kutta of order 4."""
    rate, T, dt = 20 * 0.013 / (7850 * 470 * 1e-4), 500.0, 1800 / steps
    f = lambda T: -rate * (T - 25)
    for _ in range(steps):
        a = f(T)
        b = f(T + dt / 2 * a)
        c = f(T + dt / 2 * b)
        d = f(T + dt * c)
        T += dt / 6 * (a + 2 * b + 2 * c + d)
    return T


if __name__ == "__main__":
    brick = (0.114, insulating_brick, [300, 673.15, 1273.15])
    wall = [(0.0125, 0.25, 0.25), (0.14, 0.037, 0.13), (0.009, 0.13, 0.13)]
    roof = [(0.015, 0.21, 0.21), (0.2, 0.035, 0.12), (0.018, 0.13, 0.13)]
    pin = np.pi * 0.008**2 / 4
    values = {
        "linear-k-wall rising": linear_k_wall(1, 1e-3, 20, 400, 50, 0.1),
        "linear-k-wall falling": linear_k_wall(0.8, -4e-4, 20, 600, 100, 0.2),
        "generating-wall 20 mm": generation(0, 0.01, 20, 1e6, 500, 25),
        "generating-wall thick": generation(0, 0.03, 1.2, 5e4, 12, 40),
        "generating-cylinder 10 mm": generation(1, 0.005, 15, 1e7, 1000, 25),
        "generating-cylinder thick": generation(1, 0.02, 0.5, 2e5, 30, 20),
        "straight-fin adiabatic": fin(0.04, 200, 25, constant(2e-4), constant(0.204)),
        "straight-fin convecting": fin(0.04, 200, 25, constant(2e-4), constant(0.204), tip=25),
        "pin-fin aluminium": fin(0.04, 200, 25, constant(np.pi * 0.005**2 / 4), constant(np.pi * 0.005)),
        "pin-fin steel": fin(0.06, 15, 80, constant(pin), constant(np.pi * 0.008), tip=80),
        "annular-fin corrected": annular(0.0125, 0.033, 0.001, 200, 25),
        "annular-fin adiabatic": annular(0.0125, 0.0325, 0.001, 200, 25),
        "annular-fin steel": annular(0.02, 0.05, 0.0004, 45, 60),
        "fin-array ten": array(10, 0.03, 0.001, 0.1, 0.006, 200, 25),
        "fin-array twenty-four": array(24, 0.05, 0.0008, 0.15, 0.0045, 160, 60),
        "furnace-lining bricks": lining(1373.15, 298.15, 5.5, 0.8, [(0.114, fireclay, [478, 922, 1478]), brick]),
        "furnace-lining board": lining(1273.15, 293.15, 6, 0.9, [(0.2, *brick[1:]), (0.05, constant(0.05), [])]),
        "furnace-lining constants": lining(1373.15, 298.15, 5.5, 0.8, [(0.23, constant(1.4), []), (0.1, constant(0.12), [])]),
        "pipe-surface-balance still": pipe_surface(0.1143, 0.05, 0.05, 473.15, 293.15, 0, 0.13),
        "pipe-surface-balance wind": pipe_surface(0.2191, 0.08, 0.06, 573.15, 283.15, 5, 0.26),
        "pipe-surface-balance bare": pipe_surface(0.0603, 0, 0.05, 423.15, 294.15, 0, 0.94),
        "touch-limit-thickness 50 °C": thickness_for(0.1143, 0.045, 200, 25, 5, 50),
        "touch-limit-thickness 55 °C": thickness_for(0.0603, 0.06, 350, 30, 3.5, 55),
        "economic-thickness steam": cheapest(0.1683, 0.045, 200, 15, 10, 8000, 45, 0.85, 900, 40, 0.12, 0.3),
        "economic-thickness small": cheapest(0.0337, 0.04, 90, 20, 9, 3000, 20, 0.9, 1500, 60, 0.15, 0.3),
        "economic-thickness large": cheapest(0.3239, 0.05, 350, 15, 12, 8400, 80, 0.88, 700, 35, 0.1, 0.5),
        "disc-spreading 10 mm": disc(0.005, 0.025, 0.01, 200, 500),
        "disc-spreading wide": disc(0.005, 0.05, 0.02, 200, 500),
        "buried-pipe heating": 2 * collocation([(1.2j, 0.1, 1), (-1.2j, 0.1, -1)]),
        "buried-pipe shallow": 2 * collocation([(0.5j, 0.3, 1), (-0.5j, 0.3, -1)]),
        "twin-pipes equal": collocation([(0, 0.1, 1), (0.4, 0.1, 0)]),
        "twin-pipes unequal": collocation([(0, 0.15, 1), (0.35, 0.08, 0)]),
        "eccentric-pipe": eccentric(0.05, 0.15, 0.02),
        "freezing-front ice": stefan(2.2, 917, 2050, 333500, 10, 86400),
        "freezing-front aluminium": stefan(200, 2700, 1000, 397000, 300, 60),
        "oriented-k 30°": oriented(20, 0.3, 30),
        "oriented-k 75°": oriented(1.8, 0.22, 75),
        "stud-wall upper": framed_wall(0.13, 0.04, 0.15, wall, 0, 80),
        "stud-wall lower": framed_wall(0.13, 0.04, 0.15, wall, 1e9, 320),
        "stud-wall roof upper": framed_wall(0.1, 0.04, 0.1, roof, 0, 80),
        "stud-wall roof lower": framed_wall(0.1, 0.04, 0.1, roof, 1e9, 160),
        "lumped-cooldown": cooldown(),
    }
    for name, value in values.items():
        print(f"{name}: {value}")
