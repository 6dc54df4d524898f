//! Refusals help: they list what is allowed and offer what was meant; all formats say the same.

use super::client::{Answer, ask, get, get_with, post, shared};
use serde_json::{Value, json};

/// The first fault of a refused request.
fn fault(answer: &Answer) -> Value {
    let problem = answer.json();
    assert!(answer.status >= 400, "{problem}");
    problem["errors"][0].clone()
}

fn text<'a>(fault: &'a Value, member: &str) -> &'a str {
    fault[member]
        .as_str()
        .unwrap_or_else(|| panic!("no {member}: {fault}"))
}

#[test]
fn what_is_allowed_is_listed_and_what_was_meant_is_offered() {
    for (target, detail, allowed) in [
        ("?redshift=1&to=age:Gyrs", "\"Gyr\"?", "Myr"),
        ("?redshift=1&to=comoving_distance:Gly", "write Glyr", "Gpc"),
        (
            "?redshift=1&to=comoving_volume:Gpc3",
            "write Gpc**3",
            "Mpc**3",
        ),
        ("?redshift=1&to=comoving_distance:Mpc/h", "Mpc:per_h", "Gpc"),
        (
            "?hubble_parameter=70&unit=km/s/Mpc",
            "write km/(s.Mpc)",
            "km/(s.Mpc)",
        ),
        ("?redshift=1&to=age:Mpc", "does not measure", "Gyr"),
        ("?redshift=1&to=D_L", "\"luminosity_distance\"?", "age"),
        ("?z=1", "\"redshift\"?", "luminosity_distance"),
        ("?redshift=1&H0=70", "\"hubble_constant\"?", "matter"),
        ("?redshift=1&w=-1", "\"dark_energy.w\"?", "dark_energy.form"),
        (
            "?redshift=1&model=planck-2018",
            "\"planck-2018-cmb\"",
            "round-70-30",
        ),
        (
            "?redshift=1&model=eds",
            "\"einstein-de-sitter\"?",
            "round-70-30",
        ),
        (
            "?redshift=1&hubble_constant=70&matter=0.3&dark_energy.w=-1",
            "parameter \"dark_energy.form\" is missing",
            "constant",
        ),
        (
            "?redshift=1&branch=2",
            "redshift has one branch in this model",
            "1, near",
        ),
        (
            "?angular_diameter_distance=900&branch=3",
            "has 2 branches in this model",
            "1 to 2, near",
        ),
        (
            "?redshift=1&format=xml",
            "no such format",
            "json, text, csv",
        ),
    ] {
        let fault = fault(&get(&format!("/v1/convert{target}")));
        assert!(text(&fault, "detail").contains(detail), "{target}: {fault}");
        assert!(
            text(&fault, "allowed").contains(allowed),
            "{target}: {fault}"
        );
    }
    let fault = fault(&get("/v1/models/planck-2018-cmb-lensin"));
    assert!(
        text(&fault, "detail").contains("\"planck-2018-cmb-lensing\"?"),
        "{fault}"
    );
}

#[test]
fn a_header_without_a_format_is_told_the_formats() {
    let answer = get_with("/v1/convert?redshift=1", &[("accept", "image/png")]);
    let problem = answer.json();
    assert_eq!(answer.status, 406);
    assert!(
        text(&problem, "detail").contains("application/json, text/plain, text/csv"),
        "{problem}"
    );
}

/// A member of a form that does not exist is not what is wrong.
#[test]
fn an_unknown_form_is_named_before_its_members() {
    let refused = |dark_energy: &str| {
        let model =
            format!(r#"{{"hubble_constant": 70, "matter": 0.3, "dark_energy": {dark_energy}}}"#);
        fault(&post(
            "/v1/models/describe",
            &format!(r#"{{"model": {model}}}"#),
        ))
    };
    let fault = refused(r#"{"w0": [-1, {"a": null}], "form": "w0wa"}"#);
    assert_eq!(fault["pointer"], "/model/dark_energy/form", "{fault}");
    assert!(
        text(&fault, "allowed").contains("cosmological_constant"),
        "{fault}"
    );
    let query = "redshift=1&hubble_constant=70&matter=0.3&dark_energy.form=w0wa&dark_energy.w0=-1";
    let queried = self::fault(&get(&format!("/v1/convert?{query}")));
    assert_eq!(queried["parameter"], "dark_energy.form", "{queried}");
    let fault = refused(r#"{"form": "constant", "w0": -1}"#);
    assert_eq!(fault["pointer"], "/model/dark_energy/w0", "{fault}");
    let fault = refused(r#"{"w": -1}"#);
    assert_eq!(fault["pointer"], "/model/dark_energy/form", "{fault}");
    assert!(text(&fault, "allowed").contains("constant"), "{fault}");
}

/// A null of one format is a null of all, also where the given column is asked for again.
#[test]
fn a_null_is_a_null_in_every_format() {
    let target = "/v1/convert?redshift=-0.001,0.5&to=redshift,age";
    let answer = get(target).json();
    assert_eq!(answer["columns"]["redshift"]["values"], json!([null, 0.5]));
    let csv = get(&format!("{target}&format=csv")).text();
    let lines: Vec<_> = csv.lines().collect();
    assert_eq!(lines[..2], ["redshift,age_gyr,remark", ",,blueshift"]);
    let text = get(&format!("{target}&format=text")).text();
    let first = text.lines().next().unwrap();
    assert!(
        first.starts_with("redshift") && first.contains(" null "),
        "{text}"
    );
    // What is only given is shown as it was given.
    let csv = get("/v1/convert?redshift=-0.001&to=age&format=csv").text();
    assert_eq!(csv.lines().nth(1), Some("-0.001,,blueshift"));
}

/// A terminal gets what makes a remark exact, as JSON does.
#[test]
fn a_terminal_is_told_the_details_of_a_remark() {
    let target = "/v1/convert?angular_diameter_distance=1e5&to=redshift";
    let detail = get(target).json()["remarks"][0]["detail"].clone();
    let detail = detail.as_str().unwrap();
    let lines = get(&format!("{target}&format=text")).text();
    assert!(lines.contains(&format!("({detail})")), "{lines}");
}

/// The layer that packs answers refuses by itself; nothing of the refused answer is left on it.
#[test]
fn a_coding_that_can_not_be_had_is_a_problem_without_a_tag() {
    let values = vec!["0.5"; 900].join(",");
    let target = format!("/v1/convert?redshift={values}&to=age");
    let headers = [("accept-encoding", "identity;q=0")];
    let answer = ask(shared(), "GET", &target, &headers, None);
    assert_eq!(answer.status, 406);
    assert_eq!(
        answer.header("content-type"),
        Some("application/problem+json")
    );
    assert_eq!(answer.json()["code"], "not_acceptable");
    assert_eq!(
        (answer.header("etag"), answer.header("cache-control")),
        (None, None)
    );
    assert!(answer.header("vary").is_some());
}

/// The pattern of the document lets pass what the service reads.
#[test]
fn large_exponents_are_read_as_the_document_says() {
    let answer = get("/v1/convert?redshift=1e100&to=age").json();
    assert_eq!(answer["remarks"][0]["code"], "beyond_model_range");
    let document = get("/openapi.json").json();
    let parameters = document["paths"]["/v1/convert"]["get"]["parameters"]
        .as_array()
        .unwrap();
    let redshift = parameters
        .iter()
        .find(|parameter| parameter["name"] == "redshift")
        .unwrap();
    let pattern = text(&redshift["schema"], "pattern");
    assert!(
        pattern.contains("[12][0-9]{2}") && !pattern.contains(' '),
        "{pattern}"
    );
}

#[test]
fn every_remark_that_is_said_is_explained() {
    let document = get("/openapi.json").json();
    let code = &document["components"]["schemas"]["Remark"]["properties"]["code"];
    let explained = text(code, "description");
    for target in [
        "?redshift=null,-0.5,-2,2e9,5e8&to=distance_modulus",
        "?redshift=0&to=distance_modulus",
        "?angular_diameter_distance=1e5",
        "?age=-1&to=redshift",
        "?redshift=1&to=age&hubble_constant=70&matter=0&dark_energy.form=cosmological_constant",
    ] {
        let answer = get(&format!("/v1/convert{target}")).json();
        let counts = answer["remark_counts"].as_array().unwrap();
        assert!(!counts.is_empty(), "{target}");
        for count in counts {
            let code = text(count, "code");
            assert!(explained.contains(&format!("- `{code}`: ")), "{code}");
        }
    }
    let headers = &document["paths"]["/v1/convert"]["get"]["responses"]["200"]["headers"];
    assert!(
        headers["redfathom-model"]["description"].is_string(),
        "{headers}"
    );
}
