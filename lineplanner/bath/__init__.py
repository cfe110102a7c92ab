"""What the solution does: charge to metal and film, efficiency, voltage, heat, gas, hydrogen in steel."""
