//! Findings to the documents that people and programs receive.
