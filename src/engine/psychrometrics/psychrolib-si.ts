/**
 * The one module that imports PsychroLib. Its unit switch is global, so it is set here, once, to SI:
 * °C, Pa, kg/kg, J/kg, m³/kg, relative humidity 0..1.
 */
import psychrolib from 'psychrolib';

psychrolib.SetUnitSystem(psychrolib.SI);

export { psychrolib };
