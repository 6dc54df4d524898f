//! What the reader takes and what it says about the rest.

use super::super::{Code, Fault, Numbers};
use super::{Bounds, Node};
use serde::Deserialize;

#[derive(Debug, Deserialize, PartialEq)]
#[serde(deny_unknown_fields)]
struct Outer {
    name: String,
    inner: Option<Inner>,
}

#[derive(Debug, Deserialize, PartialEq)]
#[serde(deny_unknown_fields)]
struct Inner {
    values: Numbers,
    future: Option<bool>,
}

fn read(body: &str) -> Result<Outer, Fault> {
    super::read(body.as_bytes(), &Bounds::default())
}

fn tree(body: &[u8]) -> Result<Node<'_>, Fault> {
    super::tree(body, &Bounds::default())
}

#[test]
fn a_body_becomes_its_struct() {
    let body = r#" {"inner": {"values": [0.5, null, -1e-3], "future": true}, "name": "a\u00e9\ud83d\ude00"} "#;
    let outer = read(body).unwrap();
    assert_eq!(outer.name, "aé😀");
    let inner = outer.inner.unwrap();
    assert_eq!(inner.values.0[0], 0.5);
    assert!(inner.values.0[1].is_nan());
    assert_eq!(inner.values.0[2], -0.001);
    assert_eq!(inner.future, Some(true));
}

#[test]
fn every_fault_has_its_code_and_exact_pointer() {
    for (body, code, pointer) in [
        (r#"{"inner": {}}"#, Code::MissingField, "/inner/values"),
        (r#"{"nmae": ""}"#, Code::UnknownField, "/nmae"),
        (
            r#"{"name": "", "a/b~c": 1}"#,
            Code::UnknownField,
            "/a~1b~0c",
        ),
        (r#"{"name": 1}"#, Code::WrongType, "/name"),
        (r#"{"name": "", "inner": null}"#, Code::WrongType, "/inner"),
        (r#"{"name": "", "inner": [1]}"#, Code::WrongType, "/inner"),
        (
            r#"{"name": "", "inner": {"values": "1"}}"#,
            Code::WrongType,
            "/inner/values",
        ),
        (
            r#"{"name": "", "inner": {"values": [1, "2"]}}"#,
            Code::WrongType,
            "/inner/values/1",
        ),
        (
            r#"{"name": "", "inner": {"values": [1, [2]]}}"#,
            Code::WrongType,
            "/inner/values/1",
        ),
        (
            r#"{"name": "", "inner": {"values": [1, NaN]}}"#,
            Code::JsonNotFinite,
            "/inner/values/1",
        ),
        (
            r#"{"name": "", "inner": {"values": -Infinity}}"#,
            Code::JsonNotFinite,
            "/inner/values",
        ),
        (
            r#"{"name": "", "inner": {"values": [1e400]}}"#,
            Code::JsonNotFinite,
            "/inner/values/0",
        ),
        (
            r#"{"name": "", "inner": {"values": 1, "values": 2}}"#,
            Code::DuplicateField,
            "/inner/values",
        ),
        (r#"[1]"#, Code::WrongType, ""),
    ] {
        let fault = read(body).unwrap_err();
        assert_eq!(
            (fault.code, fault.pointer()),
            (code, Some(pointer)),
            "{body}: {fault}"
        );
    }
    let fault = read(r#"{"nmae": ""}"#).unwrap_err();
    assert!(fault.detail.contains("did you mean \"name\"?"), "{fault}");
}

#[test]
fn what_is_not_json_is_refused_with_its_position() {
    let bodies: [&[u8]; 20] = [
        b"",
        b" ",
        b"{",
        b"[1,]",
        b"[1 2]",
        b"{\"a\" 1}",
        b"{a: 1}",
        b"01",
        b"1.",
        b".5",
        b"+1",
        b"-",
        b"1e",
        b"tru",
        b"\"\x01\"",
        b"\"\\x\"",
        b"\"\\ud800\"",
        b"1 2",
        b"[1.e5]",
        b"\"\xff\"",
    ];
    for body in bodies {
        let fault = tree(body).unwrap_err();
        assert_eq!(
            fault.code,
            Code::MalformedJson,
            "{}",
            String::from_utf8_lossy(body)
        );
    }
    let fault = tree(b"{\n  \"a\": ?").unwrap_err();
    assert_eq!(
        fault.detail,
        "at byte 9 (line 2, column 8): expected a value, found '?'"
    );
    let deep = "[".repeat(100_000);
    assert_eq!(tree(deep.as_bytes()).unwrap_err().code, Code::MalformedJson);
}

#[test]
fn numbers_are_correctly_rounded() {
    for text in [
        "0.1",
        "1e-5",
        "9007199254740993",
        "2.2250738585072011e-308",
        "-0",
        "5e-324",
        "1e-400",
        "0.30000000000000004",
        "123456789012345678901234567890",
        "1.7976931348623157e308",
    ] {
        let Ok(Node::Number(number)) = tree(text.as_bytes()) else {
            panic!("{text}")
        };
        let expected: f64 = text.parse().unwrap();
        assert_eq!(number.to_bits(), expected.to_bits(), "{text}");
    }
}

#[test]
fn arrays_longer_than_the_bound_are_refused() {
    let bounds = Bounds {
        elements: 3,
        ..Bounds::default()
    };
    let fault = super::tree(b"{\"a\": [1,2,3,4]}", &bounds).unwrap_err();
    assert_eq!(
        (fault.code, fault.pointer()),
        (Code::TooManyValues, Some("/a"))
    );
    let fault = super::tree(b"[1,\"\",3,4]", &bounds).unwrap_err();
    assert_eq!(fault.code, Code::TooManyValues);
    let bounds = Bounds {
        nodes: 3,
        ..Bounds::default()
    };
    assert_eq!(
        super::tree(b"[\"\",\"\",\"\"]", &bounds).unwrap_err().code,
        Code::TooManyValues
    );
}

proptest::proptest! {
    #[test]
    fn what_the_writer_writes_the_reader_reads(bits in proptest::collection::vec(proptest::num::u64::ANY, 1..50)) {
        let numbers: Vec<f64> = bits.into_iter().map(f64::from_bits).collect();
        let mut body = b"[".to_vec();
        super::super::numbers::write_list(&mut body, &numbers);
        body.push(b']');
        let Ok(Node::Numbers(read)) = tree(&body) else { panic!("{}", String::from_utf8_lossy(&body)) };
        for (read, written) in read.iter().zip(&numbers) {
            let expected = if written.is_finite() { *written } else { f64::NAN };
            proptest::prop_assert!(read.to_bits() == expected.to_bits() || (read.is_nan() && expected.is_nan()));
        }
    }

    #[test]
    fn any_bytes_are_read_or_refused(body in proptest::collection::vec(proptest::num::u8::ANY, 0..200)) {
        let _ = tree(&body);
    }

    #[test]
    fn any_words_are_read_or_refused(body in r#"[\[\]{},:"\\0-9eE.+nul trfas-]{0,60}"#) {
        let ours = tree(body.as_bytes());
        let theirs: Result<serde_json::Value, _> = serde_json::from_str(&body);
        let refusal = ours.as_ref().err().map(|fault| fault.code);
        let stricter = matches!(refusal, Some(Code::DuplicateField | Code::JsonNotFinite));
        proptest::prop_assert!(ours.is_ok() == theirs.is_ok() || stricter, "{:?} {:?}", refusal, theirs);
    }
}
