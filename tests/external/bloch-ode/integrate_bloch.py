"""Slab pulses integrated by a general-purpose ODE solver (scipy solve_ivp, DOP853), as CSV on standard output.

dM/dt = M x Omega(t), Omega = (w1(t), 0, 2 pi TBW z/S), time in pulse durations, no relaxation; w1 a Hamming-windowed
sinc whose integral (scipy quad) is the flip angle. Columns: tbw, flip_deg, z_over_slab, mxy, mz.
"""

import numpy as np
from scipy.integrate import quad, solve_ivp

CASES = [(tbw, flip) for tbw in (4, 8, 12, 20) for flip in (10, 30, 90)]
POSITIONS = [0.0, 0.2, 0.4, 0.45, 0.5, 0.55, 0.62, 0.75, 0.9, 1.2]


def shape(tbw, t):
    return (0.54 + 0.46 * np.cos(2 * np.pi * t)) * np.sinc(tbw * t)


def respond(tbw, flip_deg, z):
    area = quad(lambda t: shape(tbw, t), -0.5, 0.5, limit=400, epsabs=1e-13)[0]
    scale = np.radians(flip_deg) / area
    oz = 2 * np.pi * tbw * z

    def rate(t, m):
        ox = scale * shape(tbw, t)
        return [m[1] * oz, m[2] * ox - m[0] * oz, -m[1] * ox]

    end = solve_ivp(rate, (-0.5, 0.5), [0.0, 0.0, 1.0], method="DOP853", rtol=1e-11, atol=1e-12, max_step=0.25 / tbw).y[:, -1]
    return np.hypot(end[0], end[1]), end[2]


if __name__ == "__main__":
    print("tbw,flip_deg,z_over_slab,mxy,mz")
    for tbw, flip in CASES:
        for z in POSITIONS:
            mxy, mz = respond(tbw, flip, z)
            print(f"{tbw},{flip},{z},{mxy:.9f},{mz:.9f}")
