//! JSON requests and answers; names become references into the catalogue here and nowhere else.
