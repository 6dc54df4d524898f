//! The OpenAPI document: committed, complete, and true to what the service does.

use crate::socket::client::{ask, get, post, shared};
use redfathom::api::written;
use serde_json::Value;
use std::collections::BTreeSet;

fn document() -> Value {
    serde_json::from_str(written()).unwrap()
}

#[test]
fn the_committed_document_is_the_one_that_is_served() {
    let path = concat!(env!("CARGO_MANIFEST_DIR"), "/openapi/openapi.json");
    let committed = std::fs::read_to_string(path).unwrap_or_default();
    assert!(
        committed == written(),
        "bring it up to date: cargo run -- openapi > openapi/openapi.json"
    );
    assert_eq!(get("/openapi.json").text(), written());
}

/// Calls `see` with every value below `value` and the name of the member it is in.
fn walk(value: &Value, name: &str, see: &mut dyn FnMut(&str, &Value)) {
    see(name, value);
    match value {
        Value::Object(members) => members
            .iter()
            .for_each(|(name, member)| walk(member, name, see)),
        Value::Array(elements) => elements.iter().for_each(|element| walk(element, name, see)),
        _ => {}
    }
}

#[test]
fn every_reference_leads_somewhere_and_every_schema_is_referred_to() {
    let document = document();
    let mut found = BTreeSet::new();
    walk(&document, "", &mut |name, value| {
        if let (true, Some(target)) = (name == "$ref", value.as_str()) {
            let pointer = target.strip_prefix('#').unwrap();
            assert!(document.pointer(pointer).is_some(), "{target}");
            found.insert(target.rsplit('/').next().unwrap().to_owned());
        }
    });
    for name in document["components"]["schemas"]
        .as_object()
        .unwrap()
        .keys()
    {
        assert!(found.contains(name), "nothing refers to {name}");
    }
}

#[test]
fn nothing_is_in_it_that_breaks_generators() {
    let document = document();
    walk(
        &document["components"]["schemas"],
        "",
        &mut |name, value| {
            assert!(value.get("allOf").is_none(), "allOf in {name}");
            assert!(
                name == "properties" || value.get("default").is_none(),
                "default in {name}"
            );
            if let Some(object) = value
                .as_object()
                .filter(|object| object.contains_key("properties"))
            {
                assert!(
                    object.contains_key("description"),
                    "{name} has no description: {value}"
                );
            }
        },
    );
    for (path, method, operation) in operations(&document) {
        let id = operation["operationId"].as_str().unwrap();
        assert!(
            id.chars().all(|letter| letter.is_ascii_alphanumeric()),
            "{id}"
        );
        assert!(
            operation["description"].is_string() && operation["summary"].is_string(),
            "{method} {path}"
        );
        assert!(
            operation["responses"]["default"].is_object(),
            "{method} {path}"
        );
        // Generators take the first media type for the answer.
        let content = operation["responses"]["200"]["content"]
            .as_object()
            .unwrap();
        let first = content.keys().next().unwrap();
        assert!(
            first == "application/json" || !content.contains_key("application/json"),
            "{path}: {first}"
        );
    }
    for name in [
        "ConvertRequest",
        "From",
        "OutputRequest",
        "DeclaredModel",
        "Radiation",
        "DescribeRequest",
    ] {
        let schema = &document["components"]["schemas"][name];
        assert_eq!(schema["additionalProperties"], false, "{name}");
    }
}

fn operations(document: &Value) -> Vec<(&str, &str, &Value)> {
    let paths = document["paths"].as_object().unwrap().iter();
    let methods = paths.flat_map(|(path, item)| {
        let methods = item.as_object().unwrap().iter();
        methods.map(move |(method, operation)| (path.as_str(), method.as_str(), operation))
    });
    methods.collect()
}

/// Every example of a body is sent, and every route answers with the examples of its parameters.
#[test]
fn every_example_is_executed_and_answers_as_the_document_says() {
    let document = document();
    let mut sent = 0;
    for (path, method, operation) in operations(&document) {
        let schema = &operation["responses"]["200"]["content"]["application/json"]["schema"];
        if method == "post" {
            let examples =
                operation["requestBody"]["content"]["application/json"]["examples"].as_object();
            for (name, example) in examples.unwrap() {
                let answer = post(path, &example["value"].to_string());
                assert_eq!(answer.status, 200, "{path} {name}: {}", answer.text());
                conforms(&document, schema, &answer.json(), name);
                sent += 1;
            }
            continue;
        }
        let (mut target, mut query) = (path.to_owned(), Vec::new());
        for parameter in operation["parameters"].as_array().into_iter().flatten() {
            let name = parameter["name"].as_str().unwrap();
            match (&parameter["in"], parameter["example"].as_str()) {
                (Value::String(place), Some(example)) if place == "path" => {
                    target = target.replace(&format!("{{{name}}}"), example)
                }
                (_, Some(example)) => query.push(format!("{name}={example}")),
                _ => {}
            }
        }
        if !query.is_empty() {
            target = format!("{target}?{}", query.join("&"));
        }
        let answer = ask(
            shared(),
            "GET",
            &target,
            &[("accept", "application/json, text/plain;q=0.5")],
            None,
        );
        assert_eq!(answer.status, 200, "{target}: {}", answer.text());
        if schema.is_object() {
            conforms(&document, schema, &answer.json(), &target);
        }
        sent += 1;
    }
    assert!(sent >= 15, "{sent}");
}

/// The example of the answer is the answer, to the last digit.
#[test]
fn the_example_of_an_answer_is_what_the_service_answers() {
    let document = document();
    let operation = &document["paths"]["/v1/convert"]["post"];
    let body =
        &operation["requestBody"]["content"]["application/json"]["examples"]["declared"]["value"];
    let shown = &operation["responses"]["200"]["content"]["application/json"]["example"];
    assert!(shown.is_object());
    assert_eq!(&post("/v1/convert", &body.to_string()).json(), shown);
}

#[test]
fn problems_conform_to_their_schema() {
    let document = document();
    let schema = serde_json::json!({"$ref": "#/components/schemas/Problem"});
    for target in [
        "/nothing",
        "/v1/convert?redshift=x",
        "/v1/convert?redshift=1&matter=-1&hubble_constant=0",
    ] {
        conforms(&document, &schema, &get(target).json(), target);
    }
}

/// Checks `value` against as much of JSON Schema as the document uses; no member may be undescribed.
fn conforms(document: &Value, schema: &Value, value: &Value, place: &str) {
    if let Some(target) = schema["$ref"].as_str() {
        let schema = document.pointer(target.strip_prefix('#').unwrap()).unwrap();
        return conforms(document, schema, value, place);
    }
    if let Some(variants) = schema["oneOf"].as_array() {
        let fits = |variant: &&Value| {
            std::panic::catch_unwind(|| conforms(document, variant, value, place)).is_ok()
        };
        assert_eq!(
            variants.iter().filter(fits).count(),
            1,
            "{place}: {value} fits not one of {schema}"
        );
        return;
    }
    let kinds: Vec<&str> = match &schema["type"] {
        Value::String(kind) => vec![kind],
        Value::Array(kinds) => kinds.iter().filter_map(Value::as_str).collect(),
        _ => return,
    };
    let kind = match value {
        Value::Null => "null",
        Value::Bool(_) => "boolean",
        Value::Number(number) if number.is_u64() && kinds.contains(&"integer") => "integer",
        Value::Number(_) => "number",
        Value::String(_) => "string",
        Value::Array(_) => "array",
        Value::Object(_) => "object",
    };
    assert!(kinds.contains(&kind), "{place}: {value} is no {kinds:?}");
    if let Some(allowed) = schema["enum"].as_array() {
        assert!(allowed.contains(value), "{place}: {value}");
    }
    for element in value.as_array().into_iter().flatten() {
        conforms(document, &schema["items"], element, place);
    }
    for name in schema["required"].as_array().into_iter().flatten() {
        assert!(
            value.get(name.as_str().unwrap()).is_some(),
            "{place}: {name} is missing"
        );
    }
    for (name, member) in value.as_object().into_iter().flatten() {
        match schema["properties"].get(name) {
            Some(schema) => conforms(document, schema, member, &format!("{place}/{name}")),
            None => assert!(
                schema["properties"].is_null(),
                "{place}: {name} is not in the document"
            ),
        }
    }
}
