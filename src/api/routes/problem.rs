//! The explanation of a problem code: where `type` of a problem leads.

use super::super::accept::{JSON, TEXT, choose};
use super::super::refusal::Refusal;
use super::super::respond::whole;
use super::super::tags::AROUND;
use crate::wire::{Code, Fault, ProblemPage, meant};
use axum::extract::Path;
use axum::http::HeaderMap;
use axum::response::Response;

/// Explains a problem code
///
/// The `type` of every problem is the address of its explanation here.
#[utoipa::path(get, path = "/problems/{code}", operation_id = "getProblem", tag = AROUND,
    params(("code" = String, Path, description = "The code, as in the member `code` of a problem.", example = "unknown_quantity")),
    responses((status = 200, description = "What the code means.", content(
        (ProblemPage = "application/json"), (String = "text/plain")))))]
pub(crate) async fn problem(
    Path(name): Path<String>,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    let format = choose(&[&JSON, &TEXT], None, &headers)?;
    let Some(code) = Code::named(&name) else {
        let known = Code::ALL.iter().map(|code| code.name());
        let detail = format!("there is no such problem code{}", meant(&name, known));
        return Err(Fault::new(Code::NotFound, detail)
            .parameter("code")
            .value(name)
            .into());
    };
    let page = ProblemPage::of(code);
    if format == &TEXT {
        let ProblemPage {
            code,
            status,
            title,
            description,
        } = page;
        return Ok(whole(
            format,
            format!("{code} ({status}): {title}\n\n{description}\n"),
        ));
    }
    Ok(whole(format, serde_json::to_vec(&page).unwrap_or_default()))
}
