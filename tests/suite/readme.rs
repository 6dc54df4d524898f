//! The README: its commands run and answer what it prints; its tables are those of the catalogue.
//!
//! `UPDATE=1 cargo test --test suite readme::` writes answers and tables anew.

use crate::service::{Service, shell};
use redfathom::model::{PUBLISHED_SETS, Status};
use redfathom::prepared::ModelBook;
use redfathom::quantity::QUANTITIES;
use std::fs;
use std::path::PathBuf;
use std::sync::Mutex;

/// What the commands of the README address.
const ADDRESS: &str = "127.0.0.1:8080";

/// Tests that write the file take turns.
static FILE: Mutex<()> = Mutex::new(());

#[test]
fn commands_answer_what_the_readme_prints() {
    let service = Service::start(&[]);
    let answered = |fence: &str, block: &str| match fence {
        "console" => console(block, &service.address),
        _ => block.to_owned(),
    };
    compare(|text| python(&blocks(text, answered), &service.address));
}

#[test]
fn tables() {
    compare(|text| {
        between(
            &between(text, "quantities", &quantities()),
            "models",
            &models(),
        )
    });
}

#[test]
fn the_two_commands_are_what_the_tests_run() {
    let text = read();
    let plain: Vec<&str> = text
        .split("```sh\n")
        .skip(1)
        .filter_map(|block| block.lines().next())
        .collect();
    // The first is run for the clients by the second.
    assert_eq!(plain, ["cargo run --release", "tests/run"]);
    let runner = fs::read_to_string(path().with_file_name("tests/clients/run")).unwrap();
    assert!(runner.contains("cargo run --release"));
}

#[test]
fn the_models_file_is_one_that_starts() {
    let text = read();
    let json = text
        .split("```json\n")
        .nth(1)
        .and_then(|block| block.split("```").next())
        .unwrap();
    let file = std::env::temp_dir().join(format!("redfathom-readme-{}.json", std::process::id()));
    fs::write(&file, json).unwrap();
    let service = Service::start(&["--models", file.to_str().unwrap()]);
    assert!(
        service.greeting.contains("default model is larkfield-2026"),
        "{}",
        service.greeting
    );
    fs::remove_file(file).unwrap();
}

fn path() -> PathBuf {
    PathBuf::from(env!("CARGO_MANIFEST_DIR")).join("README.md")
}

fn read() -> String {
    fs::read_to_string(path()).unwrap()
}

/// Compares the README with what `renew` makes of it, or writes that.
fn compare(renew: impl Fn(&str) -> String) {
    let _turn = FILE.lock();
    let (old, new) = (read(), renew(&read()));
    if std::env::var_os("UPDATE").is_some() {
        fs::write(path(), new).unwrap();
    } else if let Some((old, new)) = old.lines().zip(new.lines()).find(|(old, new)| old != new) {
        panic!("README.md says\n  {old}\nand should say\n  {new}\nUPDATE=1 writes it anew");
    } else {
        assert_eq!(
            old.lines().count(),
            new.lines().count(),
            "README.md; UPDATE=1 writes it anew"
        );
    }
}

/// Rewrites each fenced block with `renew`.
fn blocks(text: &str, renew: impl Fn(&str, &str) -> String) -> String {
    let mut parts = text.split("```");
    let mut out = parts.next().unwrap().to_owned();
    while let (Some(block), Some(after)) = (parts.next(), parts.next()) {
        let (fence, content) = block.split_once('\n').unwrap();
        out += &format!("```{fence}\n{}```{after}", renew(fence, content));
    }
    out
}

/// A block of `$ command` lines (`> ` goes on with one), each followed by what it answers now.
fn console(block: &str, address: &str) -> String {
    let mut out = String::new();
    let mut lines = block.lines().peekable();
    while let Some(line) = lines.next() {
        let Some(start) = line.strip_prefix("$ ") else {
            continue;
        };
        let mut command = start.to_owned();
        out += &format!("{line}\n");
        while let Some(more) = lines.next_if(|line| line.starts_with("> ")) {
            command += &format!("\n{}", &more[2..]);
            out += &format!("{more}\n");
        }
        let output = shell(
            &command
                .replace(ADDRESS, address)
                .replace("curl ", "curl --fail-with-body -sS "),
        );
        let answer = String::from_utf8(output.stdout).unwrap();
        assert!(output.status.success(), "{command}\n{answer}");
        out += answer.trim_end();
        out += "\n";
    }
    out
}

/// Runs the Python program and puts its output into the block after it.
fn python(text: &str, address: &str) -> String {
    let (before, rest) = text.split_once("```python\n").unwrap();
    let (program, rest) = rest.split_once("```").unwrap();
    let (_, after) = rest
        .split_once("```text\n")
        .unwrap()
        .1
        .split_once("```")
        .unwrap();
    let output = shell(&format!(
        "python3 - <<'END'\n{}\nEND",
        program.replace(ADDRESS, address)
    ));
    assert!(
        output.status.success(),
        "{}",
        String::from_utf8_lossy(&output.stderr)
    );
    let answer = String::from_utf8(output.stdout).unwrap();
    format!("{before}```python\n{program}```\n\n```text\n{answer}```{after}")
}

/// Replaces what stands between the comment that begins with `name` and the next `end`.
fn between(text: &str, name: &str, table: &str) -> String {
    let start = text.find(&format!("<!-- {name}:")).unwrap();
    let start = start + text[start..].find("-->").unwrap() + 4;
    let end = start + text[start..].find("<!-- end -->").unwrap();
    format!("{}{table}{}", &text[..start], &text[end..])
}

fn quantities() -> String {
    let mut table = "| quantity | symbol | unit | | |\n|---|---|---|---|---|\n".to_owned();
    for quantity in QUANTITIES {
        let arrows = if quantity.inverse.is_some() {
            "⇄"
        } else {
            ""
        };
        table += &format!(
            "| `{}` | {} | {} | {arrows} | {} |\n",
            quantity.name, quantity.symbol, quantity.unit, quantity.meaning
        );
    }
    table
}

fn models() -> String {
    let book = ModelBook::shipped().unwrap();
    let mut table =
        "| model | | H0, km/(s.Mpc) | Ω_m | fingerprint | source |\n|---|---|---|---|---|---|\n"
            .to_owned();
    for set in PUBLISHED_SETS
        .iter()
        .filter(|set| set.status != Status::FromMemory)
    {
        let entry = book.get(set.name).unwrap();
        table += &format!(
            "| `{}` | {} | {} | {} | `{}` | {} |\n",
            set.name,
            set.title,
            entry.spec.hubble_constant,
            entry.spec.matter,
            entry.fingerprint,
            set.source
        );
    }
    table
}
