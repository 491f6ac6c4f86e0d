//! Every publication that a figure rests on: cited in the documentation and printed in reports.
//!
//! [`Provenance`] says whether the text, or the equation quoted in another text, lay before us, or
//! whether the value is recalled. A report marks a figure that rests on a recalled value as
//! unverified.

/// How a value came to us.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum Provenance {
    /// Seen in a published text or data set.
    Seen,
    /// Recalled without the text at hand; to be checked before regulatory use.
    Memory,
}

/// A publication.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Source {
    /// Name in reports and tests.
    pub key: &'static str,
    /// Author, title, place and year.
    pub citation: &'static str,
    /// Equation, table or value taken from it, and what of it was seen.
    pub locator: &'static str,
    /// Seen or recalled.
    pub provenance: Provenance,
}

/// Heat per oxygen.
pub const HUGGETT_1980: Source = Source {
    key: "huggett_1980",
    citation: "Huggett, C.: Estimation of rate of heat release by means of oxygen consumption measurements, Fire and Materials 4 (1980) 61-65",
    locator: "13.1 MJ per kg of oxygen; value seen in Peacock and Babrauskas, Fire Safety Journal 17 (1991) 387-414",
    provenance: Provenance::Seen,
};

/// Growth classes.
pub const NFPA_204: Source = Source {
    key: "nfpa_204",
    citation: "NFPA 204, Standard for Smoke and Heat Venting",
    locator: "growth classes: 1055 kW after 600, 300, 150 and 75 s",
    provenance: Provenance::Seen,
};

/// Equivalent opening; shape of the design fire.
pub const EN_1991_1_2: Source = Source {
    key: "en_1991_1_2",
    citation: "EN 1991-1-2:2002, Actions on structures exposed to fire",
    locator: "Annex A (equivalent opening), Annex E.4 (growth, steady burning, decay from 70 %)",
    provenance: Provenance::Memory,
};

/// Ventilation limit.
pub const KAWAGOE_1958: Source = Source {
    key: "kawagoe_1958",
    citation: "Kawagoe, K.: Fire behaviour in rooms, Building Research Institute Japan, Report 27 (1958)",
    locator: "m = 0.5 A √H",
    provenance: Provenance::Memory,
};

/// Orifice flow.
pub const ROCKETT_1976: Source = Source {
    key: "rockett_1976",
    citation: "Rockett, J. A.: Fire induced gas flow in an enclosure, Combustion Science and Technology 12 (1976) 165-175",
    locator: "orifice flow of a well-mixed room; ρ = 353/T as in ISO 16737",
    provenance: Provenance::Memory,
};

/// Flashover rule.
pub const BABRAUSKAS_1980: Source = Source {
    key: "babrauskas_1980",
    citation: "Babrauskas, V.: Estimating room flashover potential, Fire Technology 16 (1980) 94-103",
    locator: "Q = 750 A √H; equation seen quoted in public texts, the scatter 450 to 1050 from memory",
    provenance: Provenance::Seen,
};

/// Flashover balance.
pub const THOMAS_1981: Source = Source {
    key: "thomas_1981",
    citation: "Thomas, P. H.: Testing products and materials for their contribution to flashover in rooms, Fire and Materials 5 (1981) 103-111",
    locator: "Q = 7.8 A_T + 378 A √H; equation seen quoted in public texts, its range from memory",
    provenance: Provenance::Seen,
};

/// Hot layer and flashover.
pub const MCCAFFREY_1981: Source = Source {
    key: "mccaffrey_1981",
    citation: "McCaffrey, B. J., Quintiere, J. G., Harkleroad, M. F.: Estimating room temperatures and the likelihood of flashover using fire test data correlations, Fire Technology 17 (1981) 98-119",
    locator: "ΔT = 6.85 (Q²/(A√H h_k A_T))^(1/3); Q = 610 √(h_k A_T A√H); equations seen quoted in public texts",
    provenance: Provenance::Seen,
};

/// Flashover criteria.
pub const PEACOCK_1999: Source = Source {
    key: "peacock_1999",
    citation: "Peacock, R. D., Reneke, P. A., Bukowski, R. W., Babrauskas, V.: Defining flashover for fire hazard calculations, Fire Safety Journal 32 (1999) 331-345",
    locator: "600 °C (450 to 771), 20 kW/m² (15 to 33); 20 kW/m² seen, the ranges from memory",
    provenance: Provenance::Memory,
};

/// Wall and corner factors.
pub const MOWRER_WILLIAMSON_1987: Source = Source {
    key: "mowrer_williamson_1987",
    citation: "Mowrer, F. W., Williamson, R. B.: Estimating room temperatures from fires along walls and in corners, Fire Technology 23 (1987) 133-145",
    locator: "factors 1.3 and 1.7",
    provenance: Provenance::Memory,
};

/// Measured rooms.
pub const STECKLER_1982: Source = Source {
    key: "steckler_1982",
    citation: "Steckler, K. D., Quintiere, J. G., Rinkinen, W. J.: Flow induced by fire in a compartment, NBSIR 82-2520 (1982)",
    locator: "55 steady tests, 31.6 to 158 kW; profiles seen",
    provenance: Provenance::Seen,
};

/// Measured rooms.
pub const FSRI_2018: Source = Source {
    key: "fsri_2018",
    citation: "Willi, J., Madrzykowski, D., McKinnon, M., Dow, N.: 2018 compartment fire experimental data (2021), zenodo 5703475",
    locator: "burner, chair and sofa in a 3.66 × 3.66 × 2.44 m room; raw data seen",
    provenance: Provenance::Seen,
};

/// Forced ventilation.
pub const FOOTE_1986: Source = Source {
    key: "foote_1986",
    citation: "Foote, K. L., Pagni, P. J., Alvares, N. J.: Temperature correlations for forced-ventilated compartment fires, Fire Safety Science 1 (1986) 139-148",
    locator: "ΔT/T = 0.63 (…)^0.72 (…)^-0.36; page numbers uncertain",
    provenance: Provenance::Memory,
};

/// Forced ventilation.
pub const DEAL_BEYLER_1990: Source = Source {
    key: "deal_beyler_1990",
    citation: "Deal, S., Beyler, C.: Correlating preflashover room fire temperatures, Journal of Fire Protection Engineering 2 (1990) 33-48",
    locator: "ΔT = Q/(m c_p + h A_T), h = 0.4 max(√(kρc/t), k/d)",
    provenance: Provenance::Memory,
};

/// Cap on the conductance of thin metal.
pub const PEATROSS_BEYLER_1994: Source = Source {
    key: "peatross_beyler_1994",
    citation: "Peatross, M. J. and Beyler, C. L.: Thermal environment prediction in steel-bounded preflashover compartment fires, Fire Safety Science 4 (1994) 205-216",
    locator: "heat transfer from gas to a steel boundary, 30 W/(m² K) at first",
    provenance: Provenance::Memory,
};

/// Closed room.
pub const BEYLER_1991: Source = Source {
    key: "beyler_1991",
    citation: "Beyler, C. L., Fire Safety Journal 16 (1991) 441, as the SFPE Handbook gives it for closed compartments",
    locator: "closed compartment, steady fire; A_T put back into K1",
    provenance: Provenance::Memory,
};

/// Flame height and virtual origin.
pub const HESKESTAD_1983: Source = Source {
    key: "heskestad_1983",
    citation: "Heskestad, G.: Luminous heights of turbulent diffusion flames, Fire Safety Journal 5 (1983) 103-108; Virtual origins of fire plumes, ibid. 109-114",
    locator: "0.235 Q^0.4 - 1.02 D; 0.083 Q^0.4 - 1.02 D; worked cases seen (training slides; GB/T 31593.7-2015 Annex B)",
    provenance: Provenance::Seen,
};

/// Plume.
pub const HESKESTAD_1984: Source = Source {
    key: "heskestad_1984",
    citation: "Heskestad, G.: Engineering relations for fire plumes, Fire Safety Journal 7 (1984) 25-32",
    locator: "plume flow with 0.071 and 0.027, axis temperature",
    provenance: Provenance::Memory,
};

/// Plume.
pub const ZUKOSKI_1981: Source = Source {
    key: "zukoski_1981",
    citation: "Zukoski, E. E., Kubota, T., Cetegen, B.: Entrainment in fire plumes, Fire Safety Journal 3 (1981) 107-121",
    locator: "0.071 Q^(1/3) z^(5/3)",
    provenance: Provenance::Memory,
};

/// Large-fire plume.
pub const THOMAS_HINKLEY_1963: Source = Source {
    key: "thomas_hinkley_1963",
    citation: "Thomas, P. H., Hinkley, P. L., Theobald, C. R., Simms, D. L.: Investigations into the flow of hot gases in roof venting, Fire Research Technical Paper 7 (1963); coefficient of BR 368",
    locator: "0.188 P z^1.5: formula seen quoted, its range from memory",
    provenance: Provenance::Memory,
};

/// Plume.
pub const MCCAFFREY_1979: Source = Source {
    key: "mccaffrey_1979",
    citation: "McCaffrey, B. J.: Purely buoyant diffusion flames: some experimental results, NBSIR 79-1910 (1979)",
    locator: "three regions",
    provenance: Provenance::Memory,
};

/// Plume and filling.
pub const NFPA_92: Source = Source {
    key: "nfpa_92",
    citation: "NFPA 92, Standard for Smoke Control Systems",
    locator: "axisymmetric plume (form seen in a public text) and first indication of smoke, steady and t² (from memory)",
    provenance: Provenance::Memory,
};

/// Ceiling jet.
pub const ALPERT_1972: Source = Source {
    key: "alpert_1972",
    citation: "Alpert, R. L.: Calculation of response time of ceiling-mounted fire detectors, Fire Technology 8 (1972) 181-195",
    locator: "16.9 and 5.38 with limits, seen quoted in a public text; velocity 0.96 and 0.195 from memory",
    provenance: Provenance::Memory,
};

/// Heat element.
pub const HESKESTAD_BILL_1988: Source = Source {
    key: "heskestad_bill_1988",
    citation: "Heskestad, G., Bill, R. G.: Quantification of thermal responsiveness of automatic sprinklers including conduction effects, Fire Safety Journal 14 (1988) 113-125",
    locator: "RTI and C factor; the equation seen in the IMO nozzle test procedure",
    provenance: Provenance::Seen,
};

/// Smoke detector, front arrival.
pub const HESKESTAD_DELICHATSIOS_1977: Source = Source {
    key: "heskestad_delichatsios_1977",
    citation: "Heskestad, G., Delichatsios, M. A.: Environments of fire detectors, NBS-GCR-77-86 and 77-95 (1977); form of NFPA 72 Annex B",
    locator: "13 K rise; front arrival 0.861 (1 + r/H)",
    provenance: Provenance::Memory,
};

/// Caution on 13 K.
pub const GEIMAN_GOTTUK_2003: Source = Source {
    key: "geiman_gottuk_2003",
    citation: "Geiman, J. A., Gottuk, D. T.: Alarm thresholds for smoke detector modeling, Fire Safety Science 7 (2003) 197-208",
    locator: "10 to 15 K in use, with little basis",
    provenance: Provenance::Seen,
};

/// Smoke detector.
pub const BUKOWSKI_AVERILL_1998: Source = Source {
    key: "bukowski_averill_1998",
    citation: "Bukowski, R. W., Averill, J. D.: Methods for predicting smoke detector activation (1998)",
    locator: "4 to 5 K for modern detectors",
    provenance: Provenance::Memory,
};

/// Sprinkler.
pub const EVANS_1993: Source = Source {
    key: "evans_1993",
    citation: "Evans, D. D.: Sprinkler fire suppression algorithm for HAZARD, NISTIR 5254 (1993); Madrzykowski, D., Vettori, R. L., NISTIR 4833 (1992)",
    locator: "Q_act exp(-t/(3 w^-1.85))",
    provenance: Provenance::Memory,
};

/// Filling.
pub const ZUKOSKI_1978: Source = Source {
    key: "zukoski_1978",
    citation: "Zukoski, E. E.: Development of a stratified ceiling layer in the early stages of a closed-room fire, Fire and Materials 2 (1978) 54-62",
    locator: "filling without swelling",
    provenance: Provenance::Memory,
};

/// Filling.
pub const MOWRER_1999: Source = Source {
    key: "mowrer_1999",
    citation: "Mowrer, F. W.: Enclosure smoke filling revisited, Fire Safety Journal 33 (1999) 93-114",
    locator: "k_v = 0.064",
    provenance: Provenance::Memory,
};

/// Point source.
pub const MODAK_1977: Source = Source {
    key: "modak_1977",
    citation: "Modak, A. T.: Thermal radiation from pool fires, Combustion and Flame 29 (1977) 177-192",
    locator: "point source; the inverse square is elementary",
    provenance: Provenance::Memory,
};

/// Layer radiation.
pub const STEFAN_BOLTZMANN_LAW: Source = Source {
    key: "stefan_boltzmann_law",
    citation: "Stefan-Boltzmann law of thermal radiation",
    locator: "grey gas over a black surface; worked case seen (Korean qualification question, 2020)",
    provenance: Provenance::Seen,
};

/// View factor.
pub const CONFIGURATION_FACTORS: Source = Source {
    key: "configuration_factors",
    citation: "Howell, J. R.: A catalog of radiation heat transfer configuration factors",
    locator: "plane element to a parallel rectangle",
    provenance: Provenance::Memory,
};

/// Ignition of the next item.
pub const BABRAUSKAS_1982: Source = Source {
    key: "babrauskas_1982",
    citation: "Babrauskas, V.: Will the second item ignite?, Fire Safety Journal 4 (1981/82) 281-292",
    locator: "10, 20 and 40 kW/m²",
    provenance: Provenance::Memory,
};

/// Glass.
pub const BABRAUSKAS_GLASS_1997: Source = Source {
    key: "babrauskas_glass_1997",
    citation: "Babrauskas, V.: Glass breakage in fires (1997, later editions), with the BRI Japan statistics it cites",
    locator: "340 ± 50 °C for 3 mm, 450 °C for 4 to 6 mm, 600 °C for double glazing",
    provenance: Provenance::Memory,
};

/// Toughened glass.
pub const WANG_2014: Source = Source {
    key: "wang_2014",
    citation: "Wang, Y., Wang, Q., Shao, G. and others: fire tests of point-supported glass facades (2014)",
    locator: "toughened panes softened and bent without cracking under direct flame",
    provenance: Provenance::Seen,
};

/// Wired and fire glass.
pub const EN_1634: Source = Source {
    key: "en_1634",
    citation: "EN 1634 and BS 476 fire resistance tests of glazed elements",
    locator: "30 to 60 min",
    provenance: Provenance::Memory,
};

/// Limiting oxygen.
pub const QUINTIERE_RANGWALA_2004: Source = Source {
    key: "quintiere_rangwala_2004",
    citation: "Quintiere, J. G., Rangwala, A. S.: A theory for flame extinction based on flame temperature, Fire and Materials 28 (2004) 387-402; Beyler, C., SFPE Handbook",
    locator: "critical flame temperature 1600 to 1800 K; oxygen limit 0.13 to 0.16",
    provenance: Provenance::Memory,
};

/// Leaky room.
pub const KARLSSON_QUINTIERE_2000: Source = Source {
    key: "karlsson_quintiere_2000",
    citation: "Karlsson, B., Quintiere, J. G.: Enclosure Fire Dynamics, CRC Press (2000)",
    locator: "pressure of a leaky room; flow through two vents",
    provenance: Provenance::Memory,
};

/// Leakage.
pub const KLOTE_MILKE: Source = Source {
    key: "klote_milke",
    citation: "Klote, J. H., Milke, J. A.: Design of smoke management systems, ASHRAE; Tamura, G. T., Shaw, C. Y., ASHRAE Transactions (1976)",
    locator: "leakage ratios of walls and floors, coefficient 0.65; table seen as a rounded copy",
    provenance: Provenance::Seen,
};

/// Backdraft.
pub const GOTTUK_1999: Source = Source {
    key: "gottuk_1999",
    citation: "Gottuk, D. T., Peatross, M. J., Farley, J. P., Williams, F. W.: The development and mitigation of backdraft, Fire Safety Journal 33 (1999) 261-282",
    locator: "fuel mass fraction 0.16 for diesel, full scale",
    provenance: Provenance::Seen,
};

/// Backdraft.
pub const FLEISCHMANN_1994: Source = Source {
    key: "fleischmann_1994",
    citation: "Fleischmann, C. M., Pagni, P. J., Williamson, R. B.: Exploratory backdraft experiments, Fire Technology 29 (1993), and Quantitative backdraft experiments, Fire Safety Science 4 (1994) 337-348",
    locator: "fuel mass fraction 0.10 for methane; seen as summarised by Wu, Santamaria and Carvel, Fire Technology (2020)",
    provenance: Provenance::Seen,
};

/// Excess-fuel threshold.
pub const CRITICAL_FUEL_FRACTION: Source = Source {
    key: "critical_fuel_fraction",
    citation: "Dilution of layer gas with air against a critical flame temperature of 1700 K, computed by chemical equilibrium for seven gases beside the thresholds of Fleischmann and of Gottuk",
    locator: "3.0 to 3.9 MJ per kg of layer gas at 600 K; computed for this project, not published",
    provenance: Provenance::Memory,
};

/// Backdraft, in words.
pub const BENGTSSON_2001: Source = Source {
    key: "bengtsson_2001",
    citation: "Bengtsson, L.-G.: Enclosure fires, Swedish Rescue Services Agency (2001)",
    locator: "p. 136 and 176: high fuel, combustible linings, insulation and little leakage promote backdraft",
    provenance: Provenance::Seen,
};

/// Fire flow.
pub const ROYER_NELSON_1959: Source = Source {
    key: "royer_nelson_1959",
    citation: "Royer, K., Nelson, F. W.: Water for fire fighting: rate-of-flow formula, Iowa State University Bulletin 18 (1959)",
    locator: "V/100 gpm; worked cases seen in the trade press",
    provenance: Provenance::Seen,
};

/// Fire flow.
pub const NFA_FORMULA: Source = Source {
    key: "nfa_formula",
    citation: "National Fire Academy: quick-calculation formula for needed fire flow",
    locator: "L W/3 gpm; worked case seen in the trade press",
    provenance: Provenance::Seen,
};

/// Fire flow.
pub const ISO_NFF: Source = Source {
    key: "iso_nff",
    citation: "Insurance Services Office: Guide for determination of needed fire flow; USFA Coffee Break FP-2013-45",
    locator: "C O (1 + X + P), limits 500 to 12 000 gpm seen; 18 F √A and the factors from memory",
    provenance: Provenance::Memory,
};

/// Dose of gas and heat.
pub const ISO_13571: Source = Source {
    key: "iso_13571",
    citation: "ISO 13571, Life-threatening components of fire: guidelines for the estimation of time to compromised tenability (2007, 2012)",
    locator: "[CO]/35 000, [HCN]^2.36/1.2e6, exp([CO2]/5), hot air and radiation (the sum of the two quoted in a public text): equations from memory",
    provenance: Provenance::Memory,
};

/// Dose of low oxygen; limits of tenability.
pub const PURSER_SFPE: Source = Source {
    key: "purser_sfpe",
    citation: "Purser, D. A., McAllister, J. L.: Assessment of hazards to occupants from smoke, toxic gases and heat, SFPE Handbook of Fire Protection Engineering",
    locator: "low oxygen exp(8.13 - 0.54 (20.9 - [O2])); visibility 5 and 10 m, 2.5 kW/m², 60 °C, layer at 2 m; all from memory",
    provenance: Provenance::Memory,
};

/// Extinction by soot.
pub const MULHOLLAND_CROARKIN_2000: Source = Source {
    key: "mulholland_croarkin_2000",
    citation: "Mulholland, G. W., Croarkin, C.: Specific extinction coefficient of flame generated smoke, Fire and Materials 24 (2000) 227-230",
    locator: "8.7 ± 1.1 m²/g (95 %), flaming; from memory",
    provenance: Provenance::Memory,
};

/// Visibility through smoke.
pub const JIN_1978: Source = Source {
    key: "jin_1978",
    citation: "Jin, T.: Visibility through fire smoke, Journal of Fire and Flammability 9 (1978) 135-155",
    locator: "3 for reflecting and 8 for light-emitting signs: seen quoted in public texts, the spans 2 to 4 and 5 to 10 also",
    provenance: Provenance::Seen,
};

/// Thermal classes of crews.
pub const DONNELLY_2006: Source = Source {
    key: "donnelly_2006",
    citation: "Donnelly, M. K., Davis, W. D., Lawson, J. R., Selepak, M. J.: Thermal environment for electronic equipment used by first responders, NIST TN 1474 (2006)",
    locator: "classes I to IV; temperatures and times of I and II seen, class III and all radiation from memory",
    provenance: Provenance::Memory,
};

/// Thermal classes of crews.
pub const FOSTER_ROBERTS_1994: Source = Source {
    key: "foster_roberts_1994",
    citation: "Foster, J. A., Roberts, G. V.: Measurements of the firefighting environment, Home Office Fire Research and Development Group, Report 61 (1994)",
    locator: "routine, hazardous, extreme, critical; from memory",
    provenance: Provenance::Memory,
};

/// Thermal classes of crews.
pub const UTECH_1973: Source = Source {
    key: "utech_1973",
    citation: "Utech, H. P.: High temperatures vs. fire equipment, International Fire Chief 39 (1973) 26-27",
    locator: "routine, ordinary, emergency; from memory",
    provenance: Provenance::Memory,
};

/// Force on a door.
pub const DOOR_FORCE: Source = Source {
    key: "door_force",
    citation: "Klote, J. H., Milke, J. A.: Principles of smoke management, ASHRAE; the form that NFPA 92 prints",
    locator: "F = F_dc + W A dp/(2 (W - d)), with its table of greatest pressures; from memory",
    provenance: Provenance::Memory,
};

/// Force on a door.
pub const NFPA_101: Source = Source {
    key: "nfpa_101",
    citation: "NFPA 101, Life Safety Code, forces to open doors in means of egress",
    locator: "30 lbf to set a door in motion; from memory",
    provenance: Provenance::Memory,
};

/// Force on a door.
pub const EN_12101_6: Source = Source {
    key: "en_12101_6",
    citation: "EN 12101-6, Smoke and heat control systems: pressure differential systems",
    locator: "100 N at the handle; from memory",
    provenance: Provenance::Memory,
};

/// Numbers that place a case beside experiments.
pub const NUREG_1934: Source = Source {
    key: "nureg_1934",
    citation: "NUREG-1934 / EPRI 1023259, Nuclear power plant fire modeling analysis guidelines (2012)",
    locator: "fire Froude number, flame over ceiling height, shape, equivalence ratio; from memory",
    provenance: Provenance::Memory,
};

/// Doors.
pub const IEBC_RESOURCE_A: Source = Source {
    key: "iebc_resource_a",
    citation: "International Existing Building Code, Resource A (2009): guidelines on fire ratings of archaic materials, table 5.1",
    locator: "items D-1 (5 min) and D-4 (11 min, recommended 10)",
    provenance: Provenance::Seen,
};

/// Doors.
pub const KERBER_2012: Source = Source {
    key: "kerber_2012",
    citation: "Kerber, S.: Analysis of changing residential fire dynamics and its implications on firefighter operational timeframes, Fire Technology 48 (2012) 865-891",
    locator: "inner doors in a furnace: about 300 to 320 s; from memory",
    provenance: Provenance::Memory,
};

/// Doors.
pub const SOLID_CORE_DOORS: Source = Source {
    key: "solid_core_doors",
    citation: "Common practice: the 20-minute door of NFPA 252 is a solid core of 45 mm",
    locator: "18 to 25 min; from memory",
    provenance: Provenance::Memory,
};

/// Slow pressure.
pub const HARRIS_1983: Source = Source {
    key: "harris_1983",
    citation: "Harris, R. J.: The investigation and control of gas explosions in buildings and heating plant, British Gas / Spon (1983)",
    locator: "glass 2 to 7 kPa, inner doors 2 to 3, light partitions 2 to 5, 50 mm blocks 4 to 5, 114 mm brick 7 to 15; from memory",
    provenance: Provenance::Memory,
};

/// Slow pressure.
pub const SLOW_PRESSURE: Source = Source {
    key: "slow_pressure",
    citation: "Rasbash, D. J., on the relief of gas explosions in buildings; NFPA 68; tests of British Gas",
    locator: "light roof and cladding 2 to 5 kPa, studs with plasterboard 3 to 7, held brick of 230 mm 23 to 35; from memory",
    provenance: Provenance::Memory,
};

/// Blast.
pub const CLANCEY_1972: Source = Source {
    key: "clancey_1972",
    citation: "Clancey, V. J.: Diagnostic features of explosion damage, Sixth International Meeting of Forensic Sciences, Edinburgh (1972)",
    locator: "1.03 kPa typical glass breakage; 3.4 to 6.9 kPa windows usually shattered; table seen in public copies",
    provenance: Provenance::Seen,
};

/// A plume in a draught.
pub const HOULT_1969: Source = Source {
    key: "hoult_1969",
    citation: "Hoult, D. P., Fay, J. A., Forney, L. J.: A theory of plume rise compared with field observations, Journal of the Air Pollution Control Association 19 (1969) 585-590",
    locator: "entrainment of a bent-over plume by the wind across it, coefficient 0.6; from memory",
    provenance: Provenance::Memory,
};

/// Hot and cold gas that change places through a hole in a floor.
pub const EPSTEIN_1988: Source = Source {
    key: "epstein_1988",
    citation: "Epstein, M.: Buoyancy-driven exchange flow through small openings in horizontal partitions, Journal of Heat Transfer 110 (1988) 885-893",
    locator: "exchange 0.055 sqrt(g D^5 drho/rho) of a short square opening; from memory",
    provenance: Provenance::Memory,
};

/// The same under pressure.
pub const COOPER_1995: Source = Source {
    key: "cooper_1995",
    citation: "Cooper, L. Y.: Combined buoyancy- and pressure-driven flow through a horizontal vent, NISTIR 5384 (1994) and Fire Safety Journal (1995)",
    locator: "exchange stops from a flooding pressure on; the order of it, from memory",
    provenance: Provenance::Memory,
};

/// Carbon monoxide of starved fires.
pub const GOTTUK_LATTIMER: Source = Source {
    key: "gottuk_lattimer",
    citation: "Gottuk, D. T., Lattimer, B. Y.: Effect of combustion conditions on species production, SFPE Handbook of Fire Protection Engineering",
    locator: "carbon monoxide against the equivalence ratio, cold and hot layers; from memory",
    provenance: Provenance::Memory,
};

/// Soot that glows.
pub const TIEN_1979: Source = Source {
    key: "tien_1979",
    citation: "Tien, C. L., Lee, K. Y., Stretton, A. J.: Radiation heat transfer, SFPE Handbook of Fire Protection Engineering",
    locator: "mean absorption of soot, about 1300 f_v T per metre; from memory",
    provenance: Provenance::Memory,
};

/// Gases that glow.
pub const BLOKH_1988: Source = Source {
    key: "blokh_1988",
    citation: "Blokh, A. G.: Heat transfer in steam boiler furnaces, Hemisphere (1988)",
    locator: "grey absorption of carbon dioxide and water vapour in furnaces; from memory",
    provenance: Provenance::Memory,
};

/// Free convection.
pub const HOLMAN: Source = Source {
    key: "holman",
    citation: "Holman, J. P.: Heat Transfer, McGraw-Hill, simplified equations for free convection in air",
    locator: "1.31 dT^(1/3) upright and 1.52 dT^(1/3) level plates, turbulent; from memory",
    provenance: Provenance::Memory,
};

/// Hot gas that rises from a door.
pub const CETEGEN_1984: Source = Source {
    key: "cetegen_1984",
    citation: "Cetegen, B. M., Zukoski, E. E., Kubota, T.: Entrainment in the near and far field of fire plumes, Combustion Science and Technology 39 (1984) 305-331",
    locator: "a jet through a door treated as the far part of a plume; the treatment from memory",
    provenance: Provenance::Memory,
};

/// The method of steps.
pub const RANG_ANGERMANN_2005: Source = Source {
    key: "rang_angermann_2005",
    citation: "Rang, J., Angermann, L.: New Rosenbrock W-methods of order 3 for partial differential algebraic equations of index 1, BIT Numerical Mathematics 45 (2005) 761-787",
    locator: "coefficients of ROS34PW2 from memory; their order conditions are checked by a test",
    provenance: Provenance::Memory,
};

/// Short chains for thick sheets.
pub const DRUSKIN_KNIZHNERMAN_2000: Source = Source {
    key: "druskin_knizhnerman_2000",
    citation: "Druskin, V., Knizhnerman, L.: Gaussian spectral rules for the three-point second differences, SIAM Journal on Numerical Analysis 37 (2000) 403-422",
    locator: "a short chain that answers at its face as the sheet does; the idea, from memory",
    provenance: Provenance::Memory,
};

/// All publications, in the order of this file.
pub const ALL: &[&Source] = &[
    &HUGGETT_1980,
    &NFPA_204,
    &EN_1991_1_2,
    &KAWAGOE_1958,
    &ROCKETT_1976,
    &BABRAUSKAS_1980,
    &THOMAS_1981,
    &MCCAFFREY_1981,
    &PEACOCK_1999,
    &MOWRER_WILLIAMSON_1987,
    &STECKLER_1982,
    &FSRI_2018,
    &FOOTE_1986,
    &DEAL_BEYLER_1990,
    &PEATROSS_BEYLER_1994,
    &BEYLER_1991,
    &HESKESTAD_1983,
    &HESKESTAD_1984,
    &ZUKOSKI_1981,
    &THOMAS_HINKLEY_1963,
    &MCCAFFREY_1979,
    &NFPA_92,
    &ALPERT_1972,
    &HESKESTAD_BILL_1988,
    &HESKESTAD_DELICHATSIOS_1977,
    &GEIMAN_GOTTUK_2003,
    &BUKOWSKI_AVERILL_1998,
    &EVANS_1993,
    &ZUKOSKI_1978,
    &MOWRER_1999,
    &MODAK_1977,
    &STEFAN_BOLTZMANN_LAW,
    &CONFIGURATION_FACTORS,
    &BABRAUSKAS_1982,
    &BABRAUSKAS_GLASS_1997,
    &WANG_2014,
    &EN_1634,
    &QUINTIERE_RANGWALA_2004,
    &KARLSSON_QUINTIERE_2000,
    &KLOTE_MILKE,
    &GOTTUK_1999,
    &FLEISCHMANN_1994,
    &CRITICAL_FUEL_FRACTION,
    &BENGTSSON_2001,
    &ROYER_NELSON_1959,
    &NFA_FORMULA,
    &ISO_NFF,
    &ISO_13571,
    &PURSER_SFPE,
    &MULHOLLAND_CROARKIN_2000,
    &JIN_1978,
    &DONNELLY_2006,
    &FOSTER_ROBERTS_1994,
    &UTECH_1973,
    &DOOR_FORCE,
    &NFPA_101,
    &EN_12101_6,
    &NUREG_1934,
    &IEBC_RESOURCE_A,
    &KERBER_2012,
    &SOLID_CORE_DOORS,
    &HARRIS_1983,
    &SLOW_PRESSURE,
    &CLANCEY_1972,
    &HOULT_1969,
    &EPSTEIN_1988,
    &COOPER_1995,
    &GOTTUK_LATTIMER,
    &TIEN_1979,
    &BLOKH_1988,
    &HOLMAN,
    &CETEGEN_1984,
    &RANG_ANGERMANN_2005,
    &DRUSKIN_KNIZHNERMAN_2000,
];

/// The publication of a key.
#[must_use]
pub fn find(key: &str) -> Option<&'static Source> {
    ALL.iter().copied().find(|source| source.key == key)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn keys_are_unique_and_nothing_is_left_out() {
        for (i, source) in ALL.iter().enumerate() {
            assert!(ALL[..i].iter().all(|earlier| earlier.key != source.key), "{}", source.key);
            assert!(!source.citation.is_empty() && !source.locator.is_empty());
            assert_eq!(find(source.key).map(|found| found.citation), Some(source.citation));
        }
        assert!(find("nobody").is_none());
    }

    #[test]
    fn what_says_that_a_value_is_recalled_is_not_called_seen() {
        for source in ALL.iter().filter(|source| source.locator.ends_with("from memory")) {
            let also_seen = source.locator.contains("seen");
            assert!(source.provenance == Provenance::Memory || also_seen, "{}", source.key);
        }
    }
}
