//! Refusals say what is wrong in so many words.

use super::bad_input::{body, refused};
use super::client::{get, post};

#[test]
fn a_path_that_is_no_text_is_not_found() {
    for path in ["/v1/models/%ff", "/problems/%F0%28", "/docs/%ff"] {
        refused(&get(path), 404, "not_found");
    }
}

#[test]
fn a_malformed_query_names_its_parameter() {
    for (query, parameter) in [("redshift=1&to=%ff", "to"), ("redshift=1&future", "future")] {
        let problem = refused(
            &get(&format!("/v1/convert?{query}")),
            400,
            "malformed_query",
        );
        assert_eq!(problem["errors"][0]["parameter"], parameter);
    }
}

#[test]
fn a_number_that_json_does_not_allow_is_told_from_a_missing_one() {
    for (values, detail) in [
        ("[01]", "without a leading zero"),
        ("[5.]", "a digit after the point"),
        ("[-]", "a digit"),
    ] {
        let problem = refused(&body(values), 400, "malformed_json");
        let told = problem["detail"].as_str().unwrap();
        assert!(told.contains(detail), "{told}");
    }
}

/// What is declared is not reserved before it comes.
#[test]
fn a_body_in_pieces_is_read_whole() {
    let values = format!("[{}1]", "1,".repeat(200_000 - 1));
    let text =
        format!(r#"{{"from": {{"quantity": "redshift", "values": {values}}}, "to": ["age"]}}"#);
    let answer = post("/v1/convert", &text);
    assert_eq!(answer.status, 200);
    assert_eq!(
        answer.json()["columns"]["age"]["values"]
            .as_array()
            .unwrap()
            .len(),
        200_000
    );
}
