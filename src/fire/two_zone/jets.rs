//! Gas that comes through an opening into a layer it does not belong to rises or falls to its own, and draws of the
//! layer it passes.

/// Gas drawn by a jet on its way up, kg/s.
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
pub(super) fn drawn_kg_s(jet_kg_s: f64, rise_k: f64, height_m: f64) -> f64 {
    if jet_kg_s <= 0.0 || rise_k <= 1.0 || height_m <= 0.0 {
        return 0.0;
    }
    let heat_kw = 1e-3 * super::gas::SPECIFIC_HEAT_J_KGK * jet_kg_s * rise_k;
    let strength = 0.071 * heat_kw.cbrt();
    let origin_m = (jet_kg_s / strength).powf(0.6);
    // Fades in over the first kelvins, so that a draught of equal air draws nothing.
    let counts = ((rise_k - 1.0) / 4.0).clamp(0.0, 1.0);
    (strength * (origin_m + height_m).powf(5.0 / 3.0) - jet_kg_s).max(0.0) * counts
}
