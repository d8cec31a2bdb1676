/* Codes of the inner loop: plain numbers, because a string compared a million times a second is felt. */

/** How thrust is directed. Up along the launch site's vertical. */
export const VERTICAL = 0;
/** Tilted from that vertical, more by the second. */
export const KICK = 1;
/** Along the air-relative velocity. */
export const GRAVITY_TURN = 2;
/** tan θ straight in time over the local horizontal, parallel to a fixed plane. */
export const LINEAR_TANGENT = 3;
/** Pitch and yaw straight between nodes, in the launch site's frame as it stood at lift-off. */
export const NODES = 4;

/** How the throttled engines run. At full throttle. */
export const FULL = 0;
/** Vacuum thrust over mass held at its limit. */
export const ACCELERATION_HELD = 1;
/** Dynamic pressure held. */
export const PRESSURE_HELD = 2;
/** No engine burns. */
export const COASTING = 3;
