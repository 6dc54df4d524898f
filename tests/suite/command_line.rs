//! The real binary: its words, its refusals, its start and its stop.

use crate::service::{Service, redfathom, shell};
use std::fs;
use std::path::PathBuf;
use std::process::Output;

fn run(arguments: &[&str]) -> Output {
    redfathom().args(arguments).output().unwrap()
}

fn text(bytes: &[u8]) -> &str {
    std::str::from_utf8(bytes).unwrap()
}

/// A file of models that lives as long as the test.
struct File(PathBuf);

impl File {
    fn new(name: &str, content: &str) -> File {
        let path =
            std::env::temp_dir().join(format!("redfathom-{}-{name}.json", std::process::id()));
        fs::write(&path, content).unwrap();
        File(path)
    }

    fn path(&self) -> &str {
        self.0.to_str().unwrap()
    }
}

impl Drop for File {
    fn drop(&mut self) {
        // Left behind in a temporary folder at worst.
        let _ = fs::remove_file(&self.0);
    }
}

#[test]
fn help_names_every_option_with_its_environment_variable() {
    let output = run(&["--help"]);
    assert!(output.status.success());
    let help = text(&output.stdout);
    for word in [
        "--listen",
        "REDFATHOM_LISTEN",
        "--models",
        "--default-model",
        "--cache-bytes",
        "openapi",
        "curl",
    ] {
        assert!(help.contains(word), "{word} is not in\n{help}");
    }
    assert!(
        help.lines().all(|line| line.chars().count() <= 120),
        "{help}"
    );
}

#[test]
fn wrong_options_are_refused_with_the_option_named() {
    for (arguments, word) in [
        (&["--listen", "nowhere"][..], "--listen"),
        (&["--workers", "0"], "--workers"),
        (&["--colour"], "--colour"),
        (&["measure"], "measure"),
        (&["--drain-seconds", "-1"], "-1"),
    ] {
        let output = run(arguments);
        assert_eq!(output.status.code(), Some(2), "{arguments:?}");
        assert!(
            text(&output.stderr).contains(word),
            "{}",
            text(&output.stderr)
        );
    }
}

#[test]
fn a_wrong_models_file_stops_the_start_at_its_exact_place() {
    let model = r#"{"hubble_constant": 70, "matter": 0.3}"#;
    for (name, content, pointer) in [
        (
            "range",
            r#"{"models": {"ours": {"hubble_constant": 70, "matter": -0.3}}}"#.to_owned(),
            "/models/ours/matter",
        ),
        (
            "field",
            r#"{"models": {"ours": {"hubble_constant": 70, "mater": 0.3}}}"#.to_owned(),
            "/models/ours/mater",
        ),
        (
            "type",
            r#"{"models": {"ours": {"hubble_constant": "70", "matter": 0.3}}}"#.to_owned(),
            "/models/ours/hubble_constant",
        ),
        (
            "shipped",
            format!(r#"{{"models": {{"planck-2018-cmb-lensing": {model}}}}}"#),
            "/models/planck-2018-cmb-lensing",
        ),
        (
            "reserved",
            format!(r#"{{"models": {{"describe": {model}}}}}"#),
            "/models/describe",
        ),
        (
            "default",
            format!(r#"{{"default": "theirs", "models": {{"ours": {model}}}}}"#),
            "/default",
        ),
    ] {
        let file = File::new(name, &content);
        let output = run(&["--listen", "127.0.0.1:0", "--models", file.path()]);
        assert_eq!(output.status.code(), Some(1), "{name}");
        let message = text(&output.stderr);
        assert!(
            message.contains(&format!("{pointer}: ")) && message.contains(file.path()),
            "{name}: {message}"
        );
    }
}

#[test]
fn a_models_file_that_is_no_json_or_absent_stops_the_start() {
    let file = File::new("cut", r#"{"models": {"#);
    for path in [file.path(), "/nowhere/models.json"] {
        let output = run(&["--listen", "127.0.0.1:0", "--models", path]);
        assert_eq!(output.status.code(), Some(1));
        assert!(
            text(&output.stderr).contains(path),
            "{}",
            text(&output.stderr)
        );
    }
}

#[test]
fn the_default_comes_from_the_flag_then_the_environment_then_the_file_then_us() {
    let content = r#"{"default": "in-file", "models": {
        "in-file": {"hubble_constant": 70, "matter": 0.3}, "by-flag": {"hubble_constant": 71, "matter": 0.3},
        "by-environment": {"hubble_constant": 72, "matter": 0.3}}}"#;
    let models = File::new("precedence", content);
    let file = ["--models", models.path()];
    let flag = ["--models", models.path(), "--default-model", "by-flag"];
    let environment = [("REDFATHOM_DEFAULT_MODEL", "by-environment")];
    for (options, variables, expected) in [
        (&flag[..], &environment[..], "by-flag"),
        (&file, &environment, "by-environment"),
        (&file, &[], "in-file"),
        (&[], &[], "planck-2018-cmb-lensing"),
    ] {
        let service = Service::start_with(options, variables);
        assert!(
            service
                .greeting
                .contains(&format!("default model is {expected}.")),
            "{}",
            service.greeting
        );
    }
}

#[test]
fn an_unknown_default_is_refused_with_the_known_names() {
    let output = run(&["--listen", "127.0.0.1:0", "--default-model", "larkfeld"]);
    assert_eq!(output.status.code(), Some(1));
    let message = text(&output.stderr);
    assert!(
        message.contains("larkfeld") && message.contains("planck-2018-cmb-lensing"),
        "{message}"
    );
    let file = File::new("unknown-default", r#"{"default": "theirs"}"#);
    let output = run(&["--listen", "127.0.0.1:0", "--models", file.path()]);
    let message = text(&output.stderr);
    assert!(message.contains("round-70-30"), "{message}");
    let file = File::new("unknown-member", r#"{"x": 1}"#);
    let output = run(&["--listen", "127.0.0.1:0", "--models", file.path()]);
    let message = text(&output.stderr);
    assert!(
        message.contains("/x: ") && message.contains("allowed: default, models"),
        "{message}"
    );
}

#[test]
fn a_taken_address_is_named() {
    let service = Service::start(&[]);
    let output = run(&["--listen", &service.address]);
    assert_eq!(output.status.code(), Some(1));
    assert!(
        text(&output.stderr).contains(&service.address),
        "{}",
        text(&output.stderr)
    );
}

#[test]
fn the_health_check_tells_a_running_service_from_none() {
    let mut service = Service::start(&[]);
    assert!(
        run(&["healthcheck", "--listen", &service.address])
            .status
            .success()
    );
    service.signal("TERM");
    assert_eq!(service.end(), Some(0));
    let output = run(&["healthcheck", "--listen", &service.address]);
    assert_eq!(output.status.code(), Some(1));
    assert!(text(&output.stderr).contains(&service.address));
}

#[test]
fn a_draining_service_is_alive_but_not_ready_and_still_answers() {
    let mut service = Service::start(&["--drain-seconds", "30"]);
    service.signal("TERM");
    let status = |path: &str| {
        let output = shell(&format!(
            "curl -s -o /dev/null -w '%{{http_code}}' http://{}{path}",
            service.address
        ));
        text(&output.stdout).to_owned()
    };
    let start = std::time::Instant::now();
    while status("/readyz") != "503" {
        assert!(start.elapsed().as_secs() < 10, "still ready");
    }
    assert_eq!(status("/livez"), "200");
    assert_eq!(status("/v1/convert?redshift=1"), "200");
    // A second signal ends the drain.
    service.signal("TERM");
    assert_eq!(service.end(), Some(0));
}

#[test]
fn ctrl_c_stops_at_once() {
    let mut service = Service::start(&["--drain-seconds", "30"]);
    service.signal("INT");
    assert_eq!(service.end(), Some(0));
}

#[test]
fn the_greeting_s_lines_work_as_printed() {
    let service = Service::start(&[]);
    let output = shell(
        &service
            .greeting
            .lines()
            .skip(2)
            .map(|line| format!("{line}\n"))
            .collect::<String>(),
    );
    assert!(output.status.success(), "{}", text(&output.stderr));
    assert!(
        text(&output.stdout).contains("Gyr"),
        "{}",
        text(&output.stdout)
    );
}

#[test]
fn the_cheat_sheet_is_a_script_that_works_as_printed() {
    let service = Service::start(&[]);
    let sheet = shell(&format!("curl -s http://{}/", service.address)).stdout;
    assert!(text(&sheet).contains(&service.address), "{}", text(&sheet));
    let output = shell(&text(&sheet).replace("curl ", "curl --fail-with-body "));
    assert!(
        output.status.success(),
        "{}\n{}",
        text(&output.stdout),
        text(&output.stderr)
    );
}

/// A Host that can't be printed into commands is replaced by the address that was listened on.
#[test]
fn the_cheat_sheet_names_the_real_port_whatever_the_host() {
    let service = Service::start(&[]);
    let sheet = shell(&format!(
        "curl -sS -H 'Host: a;b' http://{}/",
        service.address
    ));
    let sheet = text(&sheet.stdout);
    assert!(
        sheet.contains(&format!("curl 'http://{}/v1/", service.address)),
        "{sheet}"
    );
}
