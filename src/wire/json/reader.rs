//! Bytes into a tree.

use super::super::code::Code;
use super::super::fault::Fault;
use super::node::{Bounds, Node};
use std::borrow::Cow;
use std::collections::HashSet;

/// Reads a whole body.
pub(super) fn read<'a>(body: &'a [u8], bounds: &Bounds) -> Result<Node<'a>, Fault> {
    let text = match std::str::from_utf8(body) {
        Ok(text) => text,
        Err(error) => {
            return Err(malformed(
                body,
                error.valid_up_to(),
                "the body is not UTF-8",
            ));
        }
    };
    let mut reader = Reader {
        text,
        bytes: body,
        at: 0,
        bounds,
        nodes: 0,
    };
    let node = reader.value(0)?;
    match reader.peek() {
        None => Ok(node),
        Some(_) => Err(reader.unexpected("the end of the body")),
    }
}

pub(super) struct Reader<'a, 'b> {
    pub(super) text: &'a str,
    pub(super) bytes: &'a [u8],
    pub(super) at: usize,
    bounds: &'b Bounds,
    nodes: usize,
}

impl<'a> Reader<'a, '_> {
    fn value(&mut self, depth: usize) -> Result<Node<'a>, Fault> {
        self.nodes += 1;
        if self.nodes > self.bounds.nodes {
            let detail = format!("the body has more than {} values", self.bounds.nodes);
            return Err(Fault::new(Code::TooManyValues, detail));
        }
        match self.peek() {
            Some(b'{' | b'[') if depth == self.bounds.depth => {
                let detail = format!("arrays and objects are nested more than {depth} deep");
                Err(malformed(self.bytes, self.at, &detail))
            }
            Some(b'{') => self.object(depth + 1),
            Some(b'[') => self.array(depth + 1),
            Some(b'"') => Ok(Node::Text(self.string()?)),
            Some(b'-' | b'0'..=b'9') => Ok(Node::Number(self.number()?)),
            Some(b't') => self.word("true").map(|()| Node::Bool(true)),
            Some(b'f') => self.word("false").map(|()| Node::Bool(false)),
            Some(b'n') => self.word("null").map(|()| Node::Null),
            _ => Err(self.unexpected("a value")),
        }
    }

    fn object(&mut self, depth: usize) -> Result<Node<'a>, Fault> {
        self.at += 1;
        let mut members = Vec::new();
        if self.peek() == Some(b'}') {
            self.at += 1;
            return Ok(Node::Object(members));
        }
        loop {
            if self.peek() != Some(b'"') {
                return Err(self.unexpected("a member name in double quotes"));
            }
            let name = self.string()?;
            if self.peek() != Some(b':') {
                return Err(self.unexpected("':'"));
            }
            self.at += 1;
            let value = self
                .value(depth)
                .map_err(|fault| self.within(fault, &name))?;
            members.push((name, value));
            match self.peek() {
                Some(b',') => self.at += 1,
                Some(b'}') => break,
                _ => return Err(self.unexpected("',' or '}'")),
            }
        }
        self.at += 1;
        match duplicate(&members) {
            None => Ok(Node::Object(members)),
            Some(name) => Err(Fault::new(
                Code::DuplicateField,
                format!("the member \"{name}\" is there twice"),
            )
            .at("")
            .inside(name)),
        }
    }

    fn array(&mut self, depth: usize) -> Result<Node<'a>, Fault> {
        self.at += 1;
        if self.peek() == Some(b']') {
            self.at += 1;
            return Ok(Node::Numbers(Vec::new()));
        }
        let mut numbers = Vec::new();
        loop {
            let number = match self.peek() {
                Some(b'-' | b'0'..=b'9') => self.number(),
                Some(b'n') => self.word("null").map(|()| f64::NAN),
                _ => return self.mixed_array(numbers, depth),
            };
            match number {
                Ok(number) => numbers.push(number),
                Err(fault) => return Err(self.within(fault, &numbers.len().to_string())),
            }
            if numbers.len() > self.bounds.elements {
                return Err(self.too_long());
            }
            if self.array_ends()? {
                return Ok(Node::Numbers(numbers));
            }
        }
    }

    /// The rest of an array of which an element is no number.
    fn mixed_array(&mut self, numbers: Vec<f64>, depth: usize) -> Result<Node<'a>, Fault> {
        let mut elements: Vec<Node<'a>> = numbers.into_iter().map(Node::of_number).collect();
        loop {
            match self.value(depth) {
                Ok(element) => elements.push(element),
                Err(fault) => return Err(self.within(fault, &elements.len().to_string())),
            }
            if elements.len() > self.bounds.elements {
                return Err(self.too_long());
            }
            if self.array_ends()? {
                return Ok(Node::Array(elements));
            }
        }
    }

    #[inline]
    fn array_ends(&mut self) -> Result<bool, Fault> {
        let next = self.peek();
        self.at += 1;
        match next {
            Some(b',') => Ok(false),
            Some(b']') => Ok(true),
            _ => {
                self.at -= 1;
                Err(self.unexpected("',' or ']'"))
            }
        }
    }

    fn word(&mut self, word: &str) -> Result<(), Fault> {
        if self
            .bytes
            .get(self.at..)
            .unwrap_or_default()
            .starts_with(word.as_bytes())
        {
            self.at += word.len();
            return Ok(());
        }
        Err(self.unexpected("a value"))
    }

    /// The next byte that is not white space.
    #[inline]
    pub(super) fn peek(&mut self) -> Option<u8> {
        loop {
            match self.bytes.get(self.at) {
                Some(b' ' | b'\t' | b'\n' | b'\r') => self.at += 1,
                other => return other.copied(),
            }
        }
    }

    /// What is wrong where the reader stands, `expected` being right.
    #[cold]
    pub(super) fn unexpected(&self, expected: &str) -> Fault {
        let rest = self.bytes.get(self.at..).unwrap_or_default();
        let length = rest
            .iter()
            .take_while(|byte| byte.is_ascii_alphabetic())
            .count();
        let word = rest.get(..length).unwrap_or_default().to_ascii_lowercase();
        if matches!(word.as_slice(), b"nan" | b"inf" | b"infinity") {
            return self.not_finite(length);
        }
        let found = match self
            .text
            .get(self.at..)
            .and_then(|rest| rest.chars().next())
        {
            Some(character) => format!("expected {expected}, found {character:?}"),
            None => format!("expected {expected}, found the end of the body"),
        };
        malformed(self.bytes, self.at, &found)
    }

    #[cold]
    fn too_long(&self) -> Fault {
        let detail = format!("an array has more than {} elements", self.bounds.elements);
        Fault::new(Code::TooManyValues, detail).at("")
    }

    /// Faults of grammar have a position instead of a pointer.
    #[cold]
    fn within(&self, fault: Fault, segment: &str) -> Fault {
        match fault.code {
            Code::MalformedJson => fault,
            _ => fault.inside(segment),
        }
    }
}

#[cold]
pub(super) fn malformed(bytes: &[u8], at: usize, what: &str) -> Fault {
    let before = bytes.get(..at).unwrap_or(bytes);
    let line = 1 + before.iter().filter(|byte| **byte == b'\n').count();
    let column = 1 + before
        .iter()
        .rev()
        .take_while(|byte| **byte != b'\n')
        .count();
    Fault::new(
        Code::MalformedJson,
        format!("at byte {at} (line {line}, column {column}): {what}"),
    )
}

/// A name that two members have.
fn duplicate<'n>(members: &'n [(Cow<'_, str>, Node<'_>)]) -> Option<&'n str> {
    let mut names = members.iter().map(|(name, _)| name.as_ref());
    if members.len() <= 8 {
        return names.enumerate().find_map(|(index, name)| {
            let earlier = members.iter().take(index);
            earlier
                .map(|(name, _)| name)
                .any(|other| other == name)
                .then_some(name)
        });
    }
    let mut seen = HashSet::with_capacity(members.len());
    names.find(|name| !seen.insert(*name))
}
