//! What spraying water does to the heat release.

use super::Exceeded;

/// Water on a fire.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Spray {
    /// Heat release when the sprinkler opens, kW.
    pub heat_release_kw: f64,
    /// Time since it opened, s.
    pub since_activation_s: f64,
    /// Water on the floor below, mm/s. 1 mm/min is 1/60.
    pub density_mm_s: f64,
}

/// Upper estimate of the heat release under a working sprinkler, in kW, by Evans.
///
/// ```text
/// Q = Q_act exp( -(t - t_act) / (3 w^(-1.85)) )
/// ```
///
/// | symbol      | field                | unit |
/// |-------------|----------------------|------|
/// | `Q_act`     | `heat_release_kw`    | kW   |
/// | `t - t_act` | `since_activation_s` | s    |
/// | `w`         | `density_mm_s`       | mm/s |
///
/// Drawn as the slowest decay of the tests (wood cribs), so it is cautious for open fuel and says
/// nothing of shielded fuel. Range: see [`evans_limits`].
///
/// Source: [`EVANS_1993`](crate::fire::sources::EVANS_1993).
///
/// ```
/// use sootline::fire::sprinkler::{Spray, evans_kw};
///
/// // By hand: w = 0.07: 3 · 0.07^(-1.85) = 410.9 s; 1000 · e^(-300/410.9) = 482 kW.
/// let spray = Spray { heat_release_kw: 1000.0, since_activation_s: 300.0, density_mm_s: 0.07 };
/// assert!((evans_kw(spray) - 482.0).abs() < 1.0);
/// ```
#[must_use]
pub fn evans_kw(spray: Spray) -> f64 {
    let since_s = spray.since_activation_s.max(0.0);
    if spray.density_mm_s <= 0.0 {
        return spray.heat_release_kw;
    }
    spray.heat_release_kw * (-since_s * spray.density_mm_s.powf(1.85) / 3.0).exp()
}

/// What a spray exceeds of the range of [`evans_kw`]: at least 0.06 mm/s, fires as large as those of the tests.
#[must_use]
pub fn evans_limits(spray: Spray) -> Exceeded {
    Exceeded::none()
        .when(spray.density_mm_s < 0.06, "less water than the 0.06 mm/s of the tests")
        .when(spray.heat_release_kw > 5000.0, "larger when the sprinkler opens than the fires of the tests")
}
