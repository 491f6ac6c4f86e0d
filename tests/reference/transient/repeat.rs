//! The experiments of the record and every input that they were run with, so that others can run the tests that were
//! kept back in the same way.

use super::Validation;
use super::inputs::Choices;
use super::point::Series;
use super::profile::Tree;
use super::series::{open_burner, steckler};

/// Source, geometry and what is sure, of each series.
const fn about(series: Series) -> [&'static str; 3] {
    match series {
        Series::Steckler => [
            "Steckler, Quintiere, Rinkinen, NBSIR 82-2520 (1982)",
            "2.8 × 2.8 × 2.18 m; doors and windows; methane, 32 to 158 kW, steady",
            "profiles seen; opening, heat and place from memory, checked against flow, temperature and mass balance; lining from memory",
        ],
        Series::OpenBurner => [
            "Willi, Madrzykowski, McKinnon, Dow, zenodo 5703475 (2021)",
            "3.66 × 3.66 × 2.44 m; door 0.90 × 2.0 m; natural gas, 100 to 500 kW, four places",
            "all seen but board and height of the burner",
        ],
        Series::ShutBurner => [
            "the same",
            "the same room, door shut; natural gas, 100 and 500 kW",
            "all seen but board, height of the burner and leakage",
        ],
        Series::Furniture => [
            "the same",
            "the same room, door open; chair and sofa, heat release as the hood measured it",
            "all seen but board and hood lag",
        ],
        Series::FurnitureShut => [
            "the same",
            "the same room, door shut; chair and sofa",
            "heat release not measured: the curve of the same item in the open is burnt",
        ],
        Series::LargeRoom => [
            "Hamins and others, NIST SP 1013-1 (2006)",
            "21.7 × 7.0 × 3.8 m; door open or shut, fans on or off; heptane, 0.4 to 1.2 MW",
            "layers seen; geometry, lining, heat and fans from memory (medium); ambient worked out from the first two rows",
        ],
        Series::Enclosure => [
            "Foote, LLNL enclosure fire tests, UCID-21236 (1987)",
            "6.0 × 4.0 × 4.5 m; fan 0.1 to 0.6 kg/s or shut; methane, 50 to 400 kW",
            "channels seen; geometry and lining from memory (medium)",
        ],
        Series::Corridor => [
            "Peacock, Davis, Lee, NBSIR 88-3752 (1988)",
            "2.3 m burn room, stub, corridor of 12.2 m; gas, 100 kW",
            "layers seen; geometry and lining from memory, and something of it does not fit",
        ],
        Series::House => [
            "UL Fire Safety Research Institute (2022)",
            "six rooms of 2.44 m on one floor, basement; propane, 110 and 280 kW",
            "channels seen; doors not dimensioned, plan partly guessed",
        ],
        Series::ReducedScale => [
            "Bryner, Johnsson, Pitts, NISTIR 5568 (1994)",
            "0.98 × 1.46 × 0.98 m, door 0.48 × 0.81 m; natural gas, 50 to 600 kW",
            "channels seen; geometry from memory (medium)",
        ],
        Series::ChairRoom => [
            "Peacock, Davis, Babrauskas, J. Res. NIST 96 (1991) 411",
            "2.26 × 3.94 × 2.31 m, window 2.0 × 1.13 m; chair",
            "channels seen; geometry from memory (low)",
        ],
    }
}

pub fn experiments(validation: &Validation) -> String {
    let mut text = String::from(
        "## Experiments\n\n| series | source | what | how sure | tests run |\n|---|---|---|---|---|\n",
    );
    for series in Series::ALL {
        let [source, what, sure] = about(series);
        let mut tests: Vec<&str> = validation
            .points
            .iter()
            .filter(|point| point.series == series)
            .map(|point| point.test.as_str())
            .collect();
        tests.sort_unstable();
        tests.dedup();
        line!(text, "| {} | {source} | {what} | {sure} | {} |", series.title(), tests.len());
    }
    text
}

pub fn choices() -> String {
    let chosen = Choices::default();
    let mut text = String::from(
        "## Inputs that no report gives\n\nOne choice each, for all series, made before the engine ran.\n\n\
         | input | value | from |\n|---|---|---|\n",
    );
    let rows = [
        ("burner top, 2018 room", format!("{} m", chosen.burner_top_m), "not stated; middle of 0.3 to 0.7 m"),
        (
            "share radiated, methane and natural gas",
            format!("{}", chosen.methane_radiates),
            "gas burner of 0.37 m, NIST (from memory); 0.14 for small flames (Tewarson, from memory)",
        ),
        (
            "share radiated, furniture",
            format!("{}", chosen.furniture_radiates),
            "common practice for mixed fuel",
        ),
        (
            "oxygen points, 2018",
            "dried gas".to_owned(),
            "common practice; not stated. Undried: see the sensitivity",
        ),
        (
            "share radiated, heptane spray; propane",
            "0.44; 0.29".to_owned(),
            "the report; Tewarson (both from memory)",
        ),
        (
            "board of the 2018 room, house, corridor",
            "gypsum, 15.9 mm, 0.17 W/(m K), 960 kg/m³, 1100 J/(kg K)".to_owned(),
            "Karlsson and Quintiere, Table 6.1 (from memory)",
        ),
        (
            "Steckler's lining",
            "ceramic-fibre board, 25 mm, 0.09 W/(m K), 260 kg/m³, 1050 J/(kg K)".to_owned(),
            "maker's values (from memory)",
        ),
        (
            "large room's lining",
            "calcium silicate, 12.7 mm, 0.12 W/(m K), 737 kg/m³, 1200 J/(kg K)".to_owned(),
            "the report (from memory)",
        ),
        (
            "enclosure's lining",
            "refractory, 0.1 m, 0.39 W/(m K), 1440 kg/m³, 1000 J/(kg K)".to_owned(),
            "the report (from memory)",
        ),
        ("leakage, 2018 room shut", format!("{} m²", chosen.leakage_2018_m2), "fits the pressure at 60 s"),
        (
            "discharge coefficient of openings",
            format!("{}", chosen.discharge_coefficient),
            "0.68 inwards, 0.73 outwards (Steckler), mean",
        ),
        ("lag of oxygen points, 2018", format!("{} s", chosen.oxygen_lag_s), "10 to 20 s, middle"),
        (
            "lag of the hood, furniture",
            format!("{} s", chosen.hood_lag_s),
            "0 to 25 s, unresolved: as logged",
        ),
        ("fuel of the furniture", "flexible foam GM23".to_owned(), "Tewarson (from memory)"),
    ];
    for (input, value, from) in rows {
        line!(text, "| {input} | {value} | {from} |");
    }
    text
}

/// Every input of a test, by series, as a request to the service takes it.
pub fn tests_one_by_one() -> String {
    let heights = |tree: &Tree| tree.sensors_m.iter().map(f64::to_string).collect::<Vec<_>>().join(", ");
    let mut text = String::from(
        "## Each series, ready to be run again\n\n\
         What is not said stands as the service has it when it is left away. In all: pressure 101 325 Pa, dry air with 0.2315 of oxygen by mass, outdoors and \
         indoors at the ambient of the test, no wind, usual tolerance. Burners come up from nothing within 10 s (`[[0, 0], [10, Q]]`), `oxygen_limited`, \
         supply `fed`. Square burners are circles of the same area. Discharge coefficient 0.7, which is usual there too.\n\n\
         Fuels, by atoms of carbon, hydrogen, oxygen, nitrogen; heat with all the air, MJ/kg, for `heat_of_combustion_mj_kg` and `chemical_heat_mj_kg` alike; yields of carbon \
         monoxide and soot: methane and natural gas 1, 4, 0, 0; 50.0; 0, 0. Propane 3, 8, 0, 0; 43.7; 0.005, 0.024. Heptane 7, 16, 0, 0; 41.2; 0.010, 0.037. Foam GM23 1, 1.8, 0.35, \
         0.06; 19.0; 0.031, 0.227, hydrogen cyanide 0.01 where starved. They have to be given as properties: the catalogue's methane gives 49.6 MJ/kg and radiates 0.141.\n\n\
         | series | room and linings | opening | fire | run, ambient | compared |\n|---|---|---|---|---|---|\n\
         | Steckler | 2.8 × 2.8 × 2.18 m; no leakage; walls and ceiling ceramic fibre 25 mm, floor calcium silicate 12.7 mm | width, height, sill of the test | \
         methane, Q of the test, 0.3 m across, base 0.02 m, position of the test (A centre, B corner, C wall), radiates 0.22 | 1800 s; ambient of the test | the state at \
         1800 s through its sensors and the integral reduction over 2.13 m; flow: mean of in and out |\n\
         | 2018 burner, open | 3.66 × 3.66 × 2.44 m; leakage 0.03 m², half low, half high; walls and ceiling gypsum board 15.9 mm, floor concrete 150 mm | door 0.90 × \
         2.0 m | natural gas as methane, nominal Q, square of 0.3 or 0.6 m (0.339, 0.677 m across), base 0.5 m, Center centre, Back and Side wall, Corner corner, radiates \
         0.22 | to the end of the window, samples every 5 s; ambient of the test | mean over the window, through its sensors and the reduction over 2.44 m |\n\
         | 2018 burner, shut | the same | door shut, no leakage of its own | the same | 1800 s, samples every 5 s | mean by volume at 60, 120, 180, 240 s while the gas is \
         on; oxygen of dried gas in the layer at 1.84 m, read 15 s earlier; end: event, else burning below a tenth; oxygen 5 s before it, also 15 s earlier |\n\
         | 2018 furniture, open | the same | door 0.90 × 2.0 m | foam GM23, heat release of the hood every 10 s as points, negative ones nought; base 0.4 m; 1.0 m across \
         (chair), 1.5 m (sofa); position of the test; radiates 0.35; supply `heat_fed`, after the flame 0.1, fading in 60 s | 600 s, samples every 1 s; ambient of the test | mean of \
         what 1.84, 2.14 and 2.415 m up would read: first 500 °C, 600 °C ever, highest; layer: every row with a rise of 100 K or more, reduction as above |\n\
         | Large room | 21.66 × 7.04 × 3.82 m; leakage 0.06 m², half low, half high; walls and ceiling calcium silicate 12.7 mm, floor gypsum board 15.9 mm | door 2.0 × 2.0 m, \
         open or shut; fans on: 1.0 m³/s in and 1.0 m³/s out, 2.4 m up | heptane, 1.6 m across, base 0.1 m, centre, radiates 0.44; Q of the test reached at 165 s | to the row \
         `peak`; ambient: lower layer at 60 s less a third of its warming from 60 to 120 s | layers of the engine at each row from 180 s (open) or from the lowest interface \
         (shut) to the row `peak` |\n\
         | Enclosure, fan | 6.0 × 4.0 × 4.5 m; leakage 0.001 m², half low, half high; all of refractory 0.1 m | duct (`vent`) 0.4 × 0.15 m, sill 3.525 m, to outside; a fan blows (exhaust - \
         fuel)/1000 · T/353 m³/s in at 0.1 m, flows of the last row, T ambient in K | methane, 50 kW per g/s of fuel of the last row, 0.57 m across, base 0.2 m, centre, radiates 0.22 | \
         to the last row; ambient: west mean of the first row | 20.95 vol-% less the dried oxygen of the upper layer against the first reading less the last |\n\n\
         Dried oxygen: the mole fraction of the wet gas over one less that of water; of the cool layer, whose water is not told, as it stands. The service counts nitrogen without the \
         argon of air and starts from 20.87 vol-% instead of 20.95: take a decrease from the run's own start. Corridor, house, reduced scale, chair room \
         have no bar; their inputs stand in the code of this folder.\n\n\
         Rows that do not count in any test, kept back or not: those of *Left out of the bars*; of the enclosure with a fan the row of a divided enclosure up to 500 s, judged with and without.\n\n",
    );
    line!(text, "Sensors of Steckler's room, m up: {}.\n", heights(&steckler::TREE));
    line!(text, "Sensors of the 2018 room, m up: {}.", heights(&open_burner::TREE));
    text
}
