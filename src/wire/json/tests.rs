//! Texts that a lenient reader would let pass, or would refuse without a place.

use super::*;

fn fault(bytes: &[u8]) -> Invalid {
    parse(bytes).unwrap_err()
}

#[test]
fn the_first_fault_is_told_with_its_place() {
    for (text, code, pointer, place) in [
        ("", "syntax", "", "line 1 column 0"),
        ("{", "syntax", "", "line 1 column 1"),
        ("{\"a\": 1,}", "syntax", "", "line 1 column 9"),
        ("{\"a\": nope}", "syntax", "/a", "line 1 column 8"),
        ("{\"rooms\": [{}, {\"height_m\": NaN}]}", "syntax", "/rooms/1/height_m", "line 1 column 29"),
        ("{\"a\":\n {\"b\": 1e309}}", "syntax", "/a/b", "line 2 column"),
        ("{\"a\": -Infinity}", "syntax", "/a", "line 1 column"),
        ("{\"a\": 01}", "syntax", "/a", "line 1 column"),
        ("{\"a\": \"\\ud800\"}", "syntax", "/a", "line 1 column"),
        ("{\"a\": \"line\nend\"}", "syntax", "/a", "line 2 column 0"),
        ("{\"a\": 1} {}", "syntax", "", "line 1 column 10"),
        ("// no comments\n{}", "syntax", "", "line 1 column 1"),
        ("{\"a\": {\"b\": 1, \"b\": 1}}", "duplicate_member", "/a/b", "line 1 column"),
        ("{\"a/b\": {\"~\": 1, \"~\": 2}}", "duplicate_member", "/a~1b/~0", "line 1 column"),
    ] {
        let fault = fault(text.as_bytes());

        assert_eq!((fault.code, fault.pointer.as_str()), (code, pointer), "{text}: {}", fault.detail);
        assert!(fault.detail.contains(place), "{text}: {}", fault.detail);
    }
}

#[test]
fn broken_encodings_are_told_by_byte() {
    let broken = fault(b"{\"name\":\n \"Caf\xe9\"}");
    assert_eq!(broken.code, "not_utf8");
    assert!(broken.detail.contains("line 2, byte 6"), "{}", broken.detail);

    assert_eq!(fault(b"\xef\xbb\xbf{}").code, "byte_order_mark");
    // UTF-16 begins with a mark that is no UTF-8.
    assert_eq!(fault(b"\xff\xfe{\0}\0").code, "not_utf8");
}

#[test]
fn nesting_is_read_to_its_limit_and_no_deeper() {
    let nested = |depth: usize| [vec![b'['; depth], vec![b']'; depth]].concat();

    assert!(parse(&nested(MAX_DEPTH)).is_ok());
    let refused = fault(&nested(MAX_DEPTH + 1));
    assert_eq!(refused.code, "too_deep");
    assert_eq!(refused.pointer.as_str(), "/0".repeat(MAX_DEPTH));
    // A million levels must not use up the stack either.
    assert_eq!(fault(&vec![b'['; 1_000_000]).code, "too_deep");
    assert_eq!(fault("{\"a\":".repeat(100_000).as_bytes()).code, "too_deep");
}

#[test]
fn what_is_lawful_is_read_as_it_stands() {
    let json = parse(br#" {"b": [null, true, -1.5, 3, "\u00e9"], "a": {}} "#).unwrap();

    assert_eq!(
        serde_json::Value::from(json),
        serde_json::json!({ "a": {}, "b": [null, true, -1.5, 3, "é"] })
    );
}
