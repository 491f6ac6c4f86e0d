use sqlx::{Executor, SqlSafeStr};

use super::*;

fn all() -> Vec<&'static str> {
    [
        crate::store::assessments::ALL,
        buildings::ALL,
        changes::ALL,
        findings::ALL,
        heads::ALL,
        parts::ALL,
        crate::store::projections::fuel_packages::ALL,
        crate::store::projections::openings::ALL,
        crate::store::projections::rooms::ALL,
        revisions::ALL,
    ]
    .concat()
}

/// Sources of this folder, tests left out.
fn sources() -> String {
    let folder = std::path::Path::new(env!("CARGO_MANIFEST_DIR")).join("src/store");
    let files = [folder.clone(), folder.join("projections")].into_iter().flat_map(|folder| {
        std::fs::read_dir(folder).unwrap().map(|entry| entry.unwrap().path()).filter(|path| path.is_file())
    });
    files.map(|file| std::fs::read_to_string(file).unwrap()).collect()
}

#[tokio::test]
async fn every_statement_is_prepared_on_the_real_migrations() {
    let kept = Kept::new().await;
    let mut connection = kept.officer().await;

    for statement in all() {
        let prepared = (&mut connection).prepare(statement.into_sql_str()).await;

        assert!(prepared.is_ok(), "{statement}\n{:?}", prepared.err());
    }
}

#[test]
fn no_statement_is_left_out_of_the_list() {
    let is_statement = |line: &&str| {
        let line = line.trim_start_matches("pub(super) ");
        line.starts_with("const ")
            && line.contains(": &str =")
            && !line.contains("_BYTES")
            && !line.contains("_KIB")
    };

    let written = sources().lines().filter(is_statement).count();

    assert_eq!(written, all().len());
    assert_eq!(sources().matches("sqlx::query(\"").count(), 1, "the pragma of closing alone is in place");
}

#[test]
fn every_statement_is_bound_to_the_callers_agency() {
    for statement in all() {
        let bound = statement.contains("agency_id = $1")
            || statement.contains("values ($1,")
            || statement.contains("values (\n        $1,");

        assert!(bound, "{statement}");
        assert_eq!(statement.to_lowercase(), statement, "lower case");
        assert!(!statement.contains("select *") && !statement.contains("->"), "{statement}");
    }
}

#[tokio::test]
async fn no_statement_reads_a_table_from_end_to_end() {
    let kept = Kept::new().await;
    let mut connection = kept.officer().await;

    for statement in all() {
        let plan = format!("explain query plan {statement}");
        let steps: Vec<(i64, i64, i64, String)> =
            sqlx::query_as(AssertSqlSafe(plan)).fetch_all(&mut connection).await.unwrap();

        for (.., step) in steps {
            assert!(!step.starts_with("SCAN"), "{step} in {statement}");
            assert!(!step.contains("TEMP B-TREE"), "{step} in {statement}");
        }
    }
}
