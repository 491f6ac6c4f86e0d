//! Enclosure fire dynamics: numbers in, numbers out.
