//! Uses, items, fuels, materials, leakage classes, detectors and sprinklers, inside the binary.
