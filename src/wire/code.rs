//! What can go wrong with a request: every code with its status, title and explanation, once.

macro_rules! codes {
    ($($variant:ident $code:literal $status:literal $title:literal $description:literal)*) => {
        /// The code of a problem; [`Code::ALL`] lists them.
        #[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
        #[allow(missing_docs)]
        pub enum Code { $($variant),* }

        impl Code {
            /// Every code the service can answer with.
            pub const ALL: &[Code] = &[$(Code::$variant),*];

            /// The code as the answer spells it, its status, its title, and its explanation.
            pub const fn entry(self) -> (&'static str, u16, &'static str, &'static str) {
                match self { $(Code::$variant => ($code, $status, $title, $description)),* }
            }
        }
    };
}

codes! {
    MalformedJson "malformed_json" 400 "The body is not JSON"
        "The body does not follow RFC 8259, is not UTF-8, or is nested too deeply. `detail` tells the byte, line and column."
    JsonNotFinite "json_not_finite" 400 "JSON has no such number"
        "NaN, Infinity and numbers beyond the range of a double can't be sent. Send null for a missing value; its row is answered with null."
    MalformedQuery "malformed_query" 400 "The query can't be understood"
        "The query string has a bad percent escape, a key without a value, or names more than one quantity to convert from."
    UnknownField "unknown_field" 400 "There is no such member"
        "The body has a member the service does not know. Nothing is ignored silently: a misspelt name would change the result."
    DuplicateField "duplicate_field" 400 "A member is there twice"
        "An object has two members of one name, or the query has one key twice, so that it is not clear which of them counts."
    MissingField "missing_field" 400 "Something is missing"
        "A member or a query parameter that the request can't do without is missing."
    WrongType "wrong_type" 400 "A member has the wrong type"
        "A member is there but is, for instance, a string where a number is needed. Absent and null differ: leave out what you don't set."
    OutOfRange "out_of_range" 400 "A value is outside its range"
        "A value lies outside the range the OpenAPI document gives for it. All such values of a request are listed."
    UnknownQuantity "unknown_quantity" 400 "There is no such quantity"
        "GET /v1/quantities lists the quantities; only those marked as invertible can be converted from."
    UnknownParameter "unknown_parameter" 400 "There is no such query parameter"
        "The query has a parameter that this route does not know. Nothing is ignored silently."
    NotFound "not_found" 404 "There is nothing at this address"
        "GET /openapi.json lists the routes."
    ModelNotFound "model_not_found" 404 "There is no model of this name"
        "GET /v1/models lists the models."
    MethodNotAllowed "method_not_allowed" 405 "The route does not know this method"
        "The header Allow lists the methods of the route."
    NotAcceptable "not_acceptable" 406 "None of the accepted formats can be written"
        "The header Accept leaves none of the formats of this route. The query parameter `format` overrides it."
    RequestTimeout "request_timeout" 408 "The request took too long to arrive"
        "The body did not arrive within the time that /v1/version states. Every request is safe to repeat."
    BodyTooLarge "body_too_large" 413 "The body is too large"
        "The body, as sent or unpacked, is larger than the limit in /v1/version. Send it in parts: rows don't depend on one another."
    TooManyValues "too_many_values" 413 "There are too many values"
        "The request has more values, or more values times outputs, than the limit in /v1/version. Send it in parts: rows don't depend on one another."
    UriTooLong "uri_too_long" 414 "The address is too long"
        "Path and query are longer than the limit in /v1/version. Send longer lists by POST."
    UnsupportedMediaType "unsupported_media_type" 415 "The body has an unsupported type"
        "The header Content-Type must name a type that the route reads, such as application/json."
    UnsupportedEncoding "unsupported_encoding" 415 "The body has an unsupported coding"
        "The header Content-Encoding may be gzip, br, zstd or identity, and one of them only; the body must be a valid stream of it."
    UnknownModel "unknown_model" 422 "The named model is not known"
        "The request names a model that this service does not have. GET /v1/models lists them."
    UnknownUnit "unknown_unit" 422 "The unit is not known"
        "Units are VOUnits 1.1 strings, such as Mpc, km/s, km/(s.Mpc) or Mpc**3."
    UnitMismatch "unit_mismatch" 422 "The unit does not fit the quantity"
        "The unit has another dimension than the quantity, or the option has no meaning for it."
    DuplicateOutput "duplicate_output" 422 "An output is asked for twice"
        "Each quantity may stand in `to` once."
    InconsistentClosure "inconsistent_closure" 422 "The densities do not add up to 1"
        "Dark-energy density and curvature are both given and the sum with matter and radiation is not 1. Leave one of them out and it follows; the error names both values that would close."
    ImpossibleModel "impossible_model" 422 "There can be no such model"
        "The declared densities contradict one another, or the expansion they give has no such history up to today."
    IndeterminateModel "indeterminate_model" 422 "The model's history can't be determined"
        "The declared numbers lie so close to the border between two histories that double precision can't tell which."
    ModelTooCostly "model_too_costly" 422 "The model needs too much work"
        "The expansion of this model can't be tabulated to the promised accuracy within the allowed work."
    UndefinedInModel "undefined_in_model" 422 "The model does not define the quantity"
        "The quantity needs something the model does not declare, such as radiation or baryons."
    HeadersTooLarge "headers_too_large" 431 "The header fields are too large"
        "All header fields together are larger than the service reads."
    InternalError "internal_error" 500 "The service has a fault"
        "The request met a fault in the service; it was recorded under the answer's x-request-id."
    Overloaded "overloaded" 503 "The service is busy"
        "More work is waiting than the service takes on. Try again after the time in Retry-After."
    Draining "draining" 503 "The service is about to stop"
        "This instance is about to stop and finishes what it has begun. Send new requests to another one."
}

impl Code {
    /// The code as the answer spells it.
    pub const fn name(self) -> &'static str {
        self.entry().0
    }

    /// The HTTP status that goes with it.
    pub const fn status(self) -> u16 {
        self.entry().1
    }

    /// The code of this spelling.
    pub fn named(name: &str) -> Option<Code> {
        Code::ALL.iter().copied().find(|code| code.name() == name)
    }
}
