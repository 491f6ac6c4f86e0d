//! Gas that comes through an opening into a layer it does not belong to rises or falls to its own, and draws of the
//! layer it passes.

use super::real::Real;

/// Depth over which an interface blurs, m.
const INTERFACE_M: f64 = 0.1;

/// Gas drawn by a jet on its way up or down, kg/s.
///
/// Taken as the far part of a fire plume of the same heat: a source below the opening that would have drawn the jet
/// itself by the height of the opening.
///
/// ```text
/// m(z) = 0.071 Q^(1/3) z^(5/3),   m(z_0) = m_jet,   drawn = m(z_0 + z) - m_jet
/// ```
///
/// Source: [`CETEGEN_1984`](crate::fire::sources::CETEGEN_1984) for the treatment, from memory; the law is that of
/// [`HESKESTAD_1984`](crate::fire::sources::HESKESTAD_1984).
pub(super) fn drawn_kg_s<R: Real>(jet_kg_s: R, rise_k: R, height_m: R) -> R {
    if jet_kg_s.value() <= 0.0 || rise_k.value() <= 1.0 || height_m.value() <= 0.0 {
        return R::constant(0.0);
    }
    let heat_kw = jet_kg_s * rise_k * (1e-3 * super::gas::SPECIFIC_HEAT_J_KGK);
    let strength = heat_kw.cbrt() * 0.071;
    let origin_m = (jet_kg_s / strength).powf(0.6);
    // Fades in over the first kelvins, so that a draught of equal air draws nothing.
    let counts = ((rise_k - 1.0) / 4.0).at_most(1.0);
    // An interface is not sharp: over its depth the jet is half in one layer, half in the other.
    let reach_m = origin_m + height_m.squared() / (height_m + INTERFACE_M);
    (strength * reach_m * reach_m.cbrt().squared() - jet_kg_s).at_least(0.0) * counts
}
