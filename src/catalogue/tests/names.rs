//! Names in the files are the names the domain gives.

use super::*;
use crate::domain::properties::{DetectorKind, ExposedGrowth, IgnitionEase};

#[test]
fn a_name_written_in_a_file_reads_back_as_what_it_names() {
    for kind in DetectorKind::ALL {
        let text = FILES[5].replace(r#""kind": "smoke_point""#, &format!(r#""kind": "{}""#, kind.name()));
        let table = Table::<DetectorProperties>::read::<super::super::rows::DetectorRow>(&text).unwrap();
        assert_eq!(table.get("smoke_point").unwrap().properties.kind, kind);
    }
    for ease in IgnitionEase::ALL {
        let text = FILES[1].replace(r#""ignition": "normal""#, &format!(r#""ignition": "{}""#, ease.name()));
        let table = Table::<ItemProperties>::read::<super::super::rows::ItemRow>(&text).unwrap();
        assert_eq!(table.get("upholstered_sofa").unwrap().properties.ignition, ease);
    }
    for growth in ExposedGrowth::ALL {
        let text = FILES[3].replace(r#""fast""#, &format!(r#""{}""#, growth.name()));
        let table = Table::<MaterialProperties>::read::<super::super::rows::MaterialRow>(&text).unwrap();
        assert_eq!(table.get("plywood").unwrap().properties.exposed_growth, Some(growth));
    }
}
