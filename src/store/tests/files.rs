use super::*;

#[tokio::test]
async fn the_file_is_in_wal_mode_and_the_writer_waits_for_the_disk() {
    let kept = Kept::new().await;

    let pragma = async |statement: &'static str| -> String {
        kept.writer
            .write::<_, StoreError, _>(move |tx| {
                Box::pin(async move {
                    let row = sqlx::query(statement).fetch_one(tx).await?;
                    let (text, number) =
                        (sqlx::Row::try_get::<String, _>(&row, 0), sqlx::Row::try_get::<i64, _>(&row, 0));
                    Ok(text.or_else(|_| number.map(|number| number.to_string()))?)
                })
            })
            .await
            .unwrap()
    };

    for (statement, expected) in [
        ("pragma journal_mode", "wal"),
        // 2 is FULL: the log is on disk before a commit is answered.
        ("pragma synchronous", "2"),
        ("pragma foreign_keys", "1"),
        ("pragma busy_timeout", "5000"),
        ("pragma trusted_schema", "0"),
        // 2 is memory.
        ("pragma temp_store", "2"),
    ] {
        assert_eq!(pragma(statement).await, expected, "{statement}");
    }
    // Bytes 18 and 19 of the header are 2 for a file in WAL mode (SQLite file format, 1.3.3).
    assert_eq!(std::fs::read(kept.path()).unwrap()[18..20], [2, 2]);
}

#[tokio::test]
async fn readers_cannot_write() {
    let kept = Kept::new().await;

    let written = sqlx::query("insert into agencies (agency_id) values ('x')").execute(&kept.readers).await;

    assert!(written.unwrap_err().to_string().contains("readonly"));
}

#[tokio::test]
async fn tables_are_strict_and_led_by_the_agency() {
    let kept = Kept::new().await;

    let loose = "select count(*) from pragma_table_list
        where type = 'table' and schema = 'main' and not strict and name not like 'sqlite_%' and name <> '_sqlx_migrations'";
    assert_eq!(kept.number(loose).await, 0);
    let not_led = "select count(*) from pragma_table_list l, pragma_table_info(l.name) c
        where l.type = 'table' and l.schema = 'main' and l.strict and c.pk = 1 and c.name <> 'agency_id'";
    assert_eq!(kept.number(not_led).await, 0);
    let led = "select count(*) from pragma_table_list l, pragma_table_info(l.name) c
        where l.type = 'table' and l.schema = 'main' and l.strict and c.pk = 1 and c.name = 'agency_id'";
    assert_eq!(kept.number(led).await, 10);
    let mut officer = kept.officer().await;
    let text_for_number =
        sqlx::query("update agencies set change_sequence = 'many'").execute(&mut officer).await;
    assert!(text_for_number.is_err());
}

#[tokio::test]
async fn what_was_acknowledged_is_there_after_reopening() {
    let kept = Kept::new().await;
    kept.enter(1, shop("Shop")).await;
    let put = kept.put_building(&local(), building_id(1), shop("Put"), Condition::Any, at(2)).await.unwrap();
    // As after a power cut: the file and its log as they are, nobody having closed them.
    let cut = tempfile::tempdir().unwrap();
    for ending in ["", "-wal"] {
        let name = format!("kept.db{ending}");
        std::fs::copy(kept.folder.path().join(&name), cut.path().join(&name)).unwrap();
    }

    let recovered = Store::open(&url(&cut.path().join("kept.db"))).await.unwrap();

    assert_eq!(recovered.get_building(&local(), building_id(1)).await.unwrap(), put);
    let next = recovered
        .put_building(&local(), building_id(1), shop("Next"), Condition::Match(vec![2]), at(3))
        .await;
    assert_eq!(next.unwrap().head.revision, 3);
}

#[tokio::test]
async fn closing_leaves_one_file_with_everything_in_it() {
    let kept = Kept::new().await;
    let entered = kept.enter(1, shop("Shop")).await;

    kept.close().await.unwrap();

    let left: Vec<_> =
        std::fs::read_dir(kept.folder.path()).unwrap().map(|file| file.unwrap().file_name()).collect();
    assert_eq!(left, ["kept.db"]);
    let again = Store::open(&url(&kept.path())).await.unwrap();
    assert_eq!(again.get_building(&local(), building_id(1)).await.unwrap(), entered);
}

#[tokio::test]
async fn a_file_is_opened_with_whatever_is_in_its_name() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("bureau 7 über.db");

    let store = Store::open(&url(&path)).await.unwrap();

    assert!(store.is_empty(&local()).await.unwrap());
    assert!(path.exists());
}

#[tokio::test]
async fn what_cannot_be_a_store_is_refused_with_its_name() {
    let folder = tempfile::tempdir().unwrap();
    std::fs::write(folder.path().join("letter.txt"), "Dear bureau, ".repeat(100)).unwrap();
    let letter = url(&folder.path().join("letter.txt"));
    let nowhere = url(&folder.path().join("no/such/folder.db"));

    for refused in [&letter, &nowhere, "sqlite::memory:", "sqlite://:memory:", "postgres://x", "kept.db", ""]
    {
        let error = Store::open(refused).await.unwrap_err();

        assert!(matches!(&error, StoreError::Open { url, .. } if url == refused), "{refused}: {error}");
    }
}

#[tokio::test]
async fn a_file_of_a_later_program_is_refused() {
    let kept = Kept::new().await;
    kept.sql(
        "insert into _sqlx_migrations (version, description, success, checksum, execution_time)
         values (9999, 'later', 1, x'00', 0)",
    )
    .await;

    let refused = Store::open(&url(&kept.path())).await.unwrap_err();

    assert!(matches!(refused, StoreError::Open { .. }), "{refused}");
}
