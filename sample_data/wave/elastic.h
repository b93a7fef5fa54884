#pragma once

#include <vector>

#include "sample_data/wave/scene.h"

namespace strikeplate::wave {

/// Vertical particle velocity of the ground, downwards, at every geophone: one row a geophone, sample k at k *
/// interval after the blow, in m/s for the line force of `force`, N/m.
struct Motion {
  double interval = 0.0;
  std::vector<std::vector<double>> velocity;
};

/// Force of the hammer at time t (s), 1 at its largest, exactly zero before the blow.
double pulseForce(Pulse pulse, double tau, double t);

/// One blow on the ground, by 2-D elastic (P-SV) finite differences on a staggered grid: velocity and stress, second
/// order in time, fourth in space, second in the rows about the ground. The ground is free of stress: above it there
/// is no mass and no stiffness, and at it densities are averaged arithmetically and shear moduli harmonically, so
/// that vertical velocities lie exactly on the surface; a slope is a stair of grid steps. The edges absorb by damping
/// all fields alike, growing with the square of the distance into the edge, which matches the impedance. `seconds` is
/// the time to compute, after the blow; the step in time is a whole part of Scene::interval. Sources: Virieux,
/// Geophysics 51 (1986) 889-901; Levander, Geophysics 53 (1988) 1425-1436; for averages at the surface Mittet,
/// Geophysics 67 (2002) 1616-1623, and Zeng et al., Geophysics 77 (2012) T1-T9; the damping edges are common
/// practice.
Motion strike(const Scene& scene, const Place& shot, double seconds);

}  // namespace strikeplate::wave
