package org.minorant.core.state;

/** Thermal states of light; filled in with the state families. */
final class ThermalStates {
    private ThermalStates() {}
}
