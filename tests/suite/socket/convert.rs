//! Conversions: the same numbers whichever way they are asked for.

use super::client::{Answer, get, get_with, post};
use serde_json::{Value, json};

/// The digits of a column's values as they were written, in the order of the answer.
fn digits(answer: &Answer, quantity: &str) -> Vec<String> {
    let text = answer.text();
    let column = text
        .split(&format!("\"{quantity}\":{{\"unit\""))
        .nth(1)
        .unwrap();
    let values = column
        .split("\"values\":[")
        .nth(1)
        .unwrap()
        .split(']')
        .next()
        .unwrap();
    values.split(',').map(str::to_owned).collect()
}

const LARKFIELD: &str = "0.0007,0.031,0.5,1.2,null,6.2,11.4,1089.9,250000000.0,1e9";

#[test]
fn get_post_and_csv_agree_bit_for_bit() {
    let quantities = get("/v1/quantities").json();
    let names: Vec<&str> = quantities["quantities"]
        .as_array()
        .unwrap()
        .iter()
        .map(|entry| entry["name"].as_str().unwrap())
        .collect();
    let model = "planck-2018-cmb-lensing";
    let to = names.join(",");
    let got = get(&format!(
        "/v1/convert?redshift={LARKFIELD}&to={to}&model={model}"
    ));
    assert_eq!(got.status, 200, "{}", got.text());
    let values: Value = serde_json::from_str(&format!("[{LARKFIELD}]")).unwrap();
    let body =
        json!({"model": model, "from": {"quantity": "redshift", "values": values}, "to": names});
    let posted = post("/v1/convert", &body.to_string());
    assert_eq!(got.text(), posted.text());

    let csv = get(&format!(
        "/v1/convert?redshift={LARKFIELD}&to={to}&model={model}&format=csv"
    ));
    let posted_csv = post("/v1/convert?format=csv", &body.to_string());
    assert_eq!(csv.text(), posted_csv.text());
    let text = csv.text();
    let mut lines = text.lines().map(|line| line.split(',').collect::<Vec<_>>());
    let header = lines.next().unwrap();
    let rows: Vec<Vec<&str>> = lines.collect();
    assert_eq!(rows.len(), 10);
    for entry in quantities["quantities"].as_array().unwrap() {
        let column = entry["column"].as_str().unwrap();
        let place = header
            .iter()
            .position(|name| *name == column)
            .unwrap_or_else(|| panic!("{column}"));
        let name = entry["name"].as_str().unwrap();
        for (row, value) in rows.iter().zip(digits(&got, name)) {
            let cell = if row[place].is_empty() {
                "null"
            } else {
                row[place]
            };
            assert_eq!(cell, value, "{name}");
        }
    }
    assert_eq!(rows[4].last(), Some(&"missing"));
}

#[test]
fn every_invertible_quantity_finds_its_redshift_again() {
    let quantities = get("/v1/quantities").json();
    for entry in quantities["quantities"].as_array().unwrap() {
        if entry["invertible"] == false {
            continue;
        }
        let name = entry["name"].as_str().unwrap();
        let there = get(&format!("/v1/convert?redshift=0.7&to={name}"));
        let value = &digits(&there, name)[0];
        let back = get(&format!("/v1/convert?{name}={value}&to=redshift")).json();
        let redshift = back["columns"]["redshift"]["values"][0].as_f64().unwrap();
        assert!((redshift / 0.7 - 1.0).abs() < 1e-13, "{name}: {redshift}");
    }
}

/// With matter alone and H0 = 70 the age at z = 3 is (2/3)/(70 km/s/Mpc)/8.
#[test]
fn the_worked_number_of_the_document_is_right() {
    let answer = get("/v1/convert?redshift=3&to=age&hubble_constant=70&matter=1").json();
    let age = answer["columns"]["age"]["values"][0].as_f64().unwrap();
    let expected = 977.792_221_680_789_2 / 70.0 * 2.0 / 3.0 / 8.0;
    assert!((age / expected - 1.0).abs() < 4e-15, "{age} {expected}");
    assert_eq!(answer["model"]["spec"]["dark_energy"]["density"], 0.0);
    assert!(answer["model"].get("defaulted").is_none());
    assert!(answer["model"].get("name").is_none());
}

#[test]
fn the_answer_says_what_it_is() {
    let answer = post(
        "/v1/convert",
        r#"{"from": {"quantity": "redshift", "values": [0.5, null, -0.5, -2, 2e9]}, "to": ["age", "luminosity_distance"], "future": true}"#,
    );
    let answer = answer.json();
    assert_eq!(answer["model"]["name"], "planck-2018-cmb-lensing");
    assert_eq!(answer["model"]["defaulted"], true);
    assert!(
        answer["model"]["fingerprint"]
            .as_str()
            .unwrap()
            .starts_with("rf1-")
    );
    assert_eq!(
        answer["service"],
        json!({"name": "redfathom", "version": env!("CARGO_PKG_VERSION")})
    );
    assert_eq!(answer["from"], json!({"quantity": "redshift", "unit": "1"}));
    let age = &answer["columns"]["age"];
    assert_eq!(age["unit"], "Gyr");
    assert_eq!(age["accuracy"]["basis"], "checked");
    assert!(age["values"][2].as_f64().unwrap() > 13.8);
    assert_eq!(
        answer["columns"]["luminosity_distance"]["values"][2],
        Value::Null
    );
    let codes: Vec<_> = answer["remarks"]
        .as_array()
        .unwrap()
        .iter()
        .map(|remark| (&remark["row"], &remark["code"]))
        .collect();
    let expected = [
        (1, "missing"),
        (2, "blueshift"),
        (3, "outside_domain"),
        (4, "beyond_model_range"),
    ];
    let expected = expected.map(|(row, code)| (json!(row), json!(code)));
    let expected: Vec<_> = expected.iter().map(|(row, code)| (row, code)).collect();
    assert_eq!(codes, expected);
    assert_eq!(answer["remarks"][1]["column"], "luminosity_distance");
    assert_eq!(answer["remark_counts"].as_array().unwrap().len(), 4);
}

#[test]
fn units_and_per_h_are_honoured_and_told() {
    let answer = get(
        "/v1/convert?redshift=0.5&to=age:Myr,comoving_distance:kpc:per_h,luminosity_distance&hubble_constant=70&matter=0.3",
    );
    let answer = answer.json();
    let plain =
        get("/v1/convert?redshift=0.5&to=age,comoving_distance&hubble_constant=70&matter=0.3")
            .json();
    let value = |answer: &Value, name: &str| answer["columns"][name]["values"][0].as_f64().unwrap();
    assert!((value(&answer, "age") / value(&plain, "age") / 1e3 - 1.0).abs() < 1e-15);
    assert!(
        (value(&answer, "comoving_distance") / value(&plain, "comoving_distance") / 700.0 - 1.0)
            .abs()
            < 1e-15
    );
    assert_eq!(answer["columns"]["comoving_distance"]["per_h"], true);
    assert_eq!(answer["columns"]["comoving_distance"]["unit"], "kpc");
    assert!(
        answer["columns"]["luminosity_distance"]
            .get("per_h")
            .is_none()
    );
    let csv =
        get("/v1/convert?redshift=0.5&to=comoving_distance:Mpc:per_h,hubble_parameter&format=csv")
            .text();
    assert!(
        csv.starts_with(
            "redshift,comoving_distance_mpc_per_h,hubble_parameter_km_per_s_mpc,remark\n"
        ),
        "{csv}"
    );
}

#[test]
fn a_value_that_two_redshifts_have_is_found_on_both_branches() {
    let target = "/v1/convert?angular_diameter_distance=1500&to=redshift&hubble_constant=70&matter=0.3&branch=";
    let all = get(&format!("{target}all")).json();
    let branches = all["columns"]["redshift"]["branches"].as_array().unwrap();
    assert_eq!(branches.len(), 2);
    let near = get(&format!("{target}near")).json();
    let far = get(&format!("{target}far")).json();
    assert_eq!(near["columns"]["redshift"]["values"], branches[0]["values"]);
    assert_eq!(far["columns"]["redshift"]["values"], branches[1]["values"]);
    assert_eq!(get(&format!("{target}2")).json()["columns"], far["columns"]);
    assert_eq!(all["branches"].as_array().unwrap().len(), 2);
    let csv = get(&format!("{target}all&format=csv")).text();
    assert!(
        csv.starts_with("angular_diameter_distance_mpc,redshift,redshift_branch_2,remark\n"),
        "{csv}"
    );
}

#[test]
fn a_terminal_gets_aligned_lines() {
    let answer = get_with(
        "/v1/convert?redshift=7.3&to=age",
        &[("accept", "text/plain")],
    );
    let text = answer.text();
    let lines: Vec<_> = text.lines().collect();
    assert_eq!(lines.len(), 3, "{text}");
    assert!(
        lines[1].starts_with("age ") && lines[1].contains(" Gyr "),
        "{text}"
    );
    assert!(
        lines[2].starts_with("# planck-2018-cmb-lensing (rf1-"),
        "{text}"
    );
    assert_eq!(
        answer.header("redfathom-version"),
        Some(env!("CARGO_PKG_VERSION"))
    );
    assert!(
        answer
            .header("redfathom-model")
            .unwrap()
            .starts_with("rf1-")
    );
    assert!(
        answer
            .header("link")
            .unwrap()
            .contains("rel=\"describedby\"")
    );
}

/// What is written in chunks has the same digits as what is written at once.
#[test]
fn a_large_answer_comes_in_chunks_with_the_same_digits() {
    let redshifts: Vec<f64> = (0..20_000).map(|row| f64::from(row) * 3.7e-4).collect();
    let body = json!({"from": {"quantity": "redshift", "values": redshifts}, "to": ["luminosity_distance"]});
    let large = post("/v1/convert", &body.to_string());
    assert_eq!(large.header("transfer-encoding"), Some("chunked"));
    let large = digits(&large, "luminosity_distance");
    assert_eq!(large.len(), 20_000);
    let some: Vec<_> = redshifts.iter().step_by(97).collect();
    let body =
        json!({"from": {"quantity": "redshift", "values": some}, "to": ["luminosity_distance"]});
    let small = post("/v1/convert", &body.to_string());
    assert!(small.header("content-length").is_some());
    let expected: Vec<_> = large.iter().step_by(97).cloned().collect();
    assert_eq!(digits(&small, "luminosity_distance"), expected);
}

#[test]
fn no_rows_give_no_rows() {
    let answer = post(
        "/v1/convert",
        r#"{"from": {"quantity": "redshift", "values": []}, "to": ["age"]}"#,
    )
    .json();
    assert_eq!(answer["columns"]["age"]["values"], json!([]));
}
