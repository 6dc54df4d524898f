//! Models, quantities, the description, the pages around them.

use super::client::{get, get_with, post};

#[test]
fn the_list_leads_to_each_model() {
    let list = get("/v1/models").json();
    assert_eq!(list["default"], "planck-2018-cmb-lensing");
    let models = list["models"].as_array().unwrap();
    assert!(models.iter().any(|model| model["name"] == list["default"]));
    for model in models {
        assert_ne!(model["status"], "from_memory");
        let name = model["name"].as_str().unwrap();
        assert_eq!(&get(&format!("/v1/models/{name}")).json(), model);
        let answer = get(&format!("/v1/convert?redshift=1&to=age&model={name}")).json();
        assert_eq!(answer["model"]["fingerprint"], model["fingerprint"]);
        assert_eq!(answer["model"]["spec"], model["spec"]);
    }
    let remembered = get("/v1/models?status=from_memory").json();
    for model in remembered["models"].as_array().unwrap() {
        assert_eq!(model["status"], "from_memory");
    }
}

/// An echo sent back is the same model.
#[test]
fn a_spec_can_be_declared_again() {
    for model in get("/v1/models").json()["models"].as_array().unwrap() {
        let body = serde_json::json!({"model": model["spec"]});
        let answer = post("/v1/models/describe", &body.to_string());
        assert_eq!(answer.status, 200, "{}", answer.text());
        assert_eq!(answer.json()["model"]["fingerprint"], model["fingerprint"]);
    }
}

/// Planck Collaboration 2020, A&A 641, A6, table 2 prints 13.797 Gyr and r_drag = 147.09 Mpc for this set.
#[test]
fn a_model_is_described() {
    let answer = post(
        "/v1/models/describe",
        r#"{"model": "planck-2018-cmb-lensing"}"#,
    );
    let described = answer.json();
    let age = &described["today"]["age"];
    assert!(
        (age["value"].as_f64().unwrap() - 13.797).abs() < 0.01,
        "{age}"
    );
    assert_eq!(age["unit"], "Gyr");
    let drag = &described["early"]["drag"];
    assert!(
        (drag["sound_horizon"]["value"].as_f64().unwrap() - 147.09).abs() < 0.3,
        "{drag}"
    );
    assert_eq!(described["past"]["kind"], "hot_beginning");
    assert_eq!(described["fate"]["kind"], "expands_for_ever");
    assert_eq!(described["accuracy"]["age"]["basis"], "checked");
    assert!(described["table_bytes"].as_u64().unwrap() < 65_536);
    let bare = post(
        "/v1/models/describe",
        r#"{"model": {"hubble_constant": 70, "matter": 1}}"#,
    )
    .json();
    assert!(bare["early"]["drag"]["redshift"]["value"].is_null());
    assert!(bare["early"]["drag"]["redshift"]["reason"].is_string());
}

#[test]
fn the_first_page_is_for_whoever_asks() {
    let terminal = get_with("/", &[("accept", "*/*")]);
    assert!(terminal.text().starts_with("# Redfathom"));
    let browser = get_with(
        "/",
        &[("accept", "text/html,application/xhtml+xml,*/*;q=0.8")],
    );
    assert!(browser.text().starts_with("<!"));
    assert_eq!(
        browser.header("content-type"),
        Some("text/html; charset=utf-8")
    );
    assert!(browser.header("content-security-policy").is_some());
}

#[test]
fn the_documentation_needs_nothing_from_outside() {
    assert_eq!(get("/docs").header("location"), Some("/docs/"));
    let page = get("/docs/").text();
    for outside in ["http://", "https://", "src=\"//"] {
        assert!(!page.contains(outside), "{outside} in {page}");
    }
    for part in page
        .split(['"', '\''])
        .filter(|part| part.ends_with(".js") || part.ends_with(".css"))
    {
        assert_eq!(
            get(&format!("/docs/{}", part.trim_start_matches("./"))).status,
            200,
            "{part}"
        );
    }
    let script = get("/docs/swagger-initializer.js").text();
    assert!(
        script.contains("/openapi.json") && script.contains("none"),
        "{script}"
    );
}

#[test]
fn the_version_tells_constants_and_limits() {
    let answer = get("/v1/version").json();
    assert_eq!(answer["version"], env!("CARGO_PKG_VERSION"));
    assert_eq!(answer["limits"]["values"], 1_000_000);
    assert_eq!(answer["limits"]["body_bytes"], 33_554_432);
    let constants = answer["constants"].as_array().unwrap();
    let light = constants
        .iter()
        .find(|constant| constant["name"] == "speed_of_light")
        .unwrap();
    assert_eq!(light["value"], 299_792.458);
}

#[test]
fn misspelt_names_are_answered_with_the_nearest() {
    for (target, meant) in [
        (
            "/v1/convert?redshift=1&to=luminosity_distnace",
            "luminosity_distance",
        ),
        ("/v1/convert?redhift=1", "redshift"),
        (
            "/v1/convert?redshift=1&model=planck-2018-cmb-lensin",
            "planck-2018-cmb-lensing",
        ),
        (
            "/v1/convert?redshift=1&hubble_constant=70&matter=0.3&dark_energy.from=none",
            "dark_energy.form",
        ),
        (
            "/v1/models/planck-2018-cmb-lensin",
            "planck-2018-cmb-lensing",
        ),
        ("/problems/unknown_quantty", "unknown_quantity"),
    ] {
        let problem = get(target).json();
        assert!(
            problem["detail"]
                .as_str()
                .unwrap()
                .contains(&format!("\"{meant}\"")),
            "{problem}"
        );
    }
}
