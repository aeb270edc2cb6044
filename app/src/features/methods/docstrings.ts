/** Docstrings of the science room, written by `npm run methods`; a test holds them to the source. */
export const DOCSTRINGS: { id: string; summary: string; params: [string, string][]; returns: string }[] = [
  {
    id: 'counterpart/position-error#centroidError',
    summary: 'Statistical error of an HI centroid along one beam axis. Method: position.',
    params: [
      ['fwhmArcsec', 'beam FWHM along the axis, arcsec'],
      ['signalToNoise', 'integrated, matched-filter signal-to-noise'],
      ['factor', '0.60 by default (Ivison et al. 2007, MNRAS 380, 199, from memory); see CONDON_FACTOR'],
    ],
    returns: '1-D sigma, arcsec',
  },
  {
    id: 'counterpart/position-error#mahalanobisSquared',
    summary:
      'Squared Mahalanobis distance of an offset; a larger one has probability exp(-d2/2) for a true pair. Method: position.',
    params: [
      ['covariance', 'total covariance, square arcsec'],
      ['eastArcsec', 'offset east (times cos dec), arcsec'],
      ['northArcsec', 'offset north, arcsec'],
    ],
    returns: '',
  },
  {
    id: 'counterpart/search-radius#radiusHolding',
    summary:
      'Radius of the circle that holds a share of the true offsets. 0.997 of a mixture with a tail is wider than 3.44 sigma of its core. Method: position.',
    params: [
      ['share', 'share wanted, between 0 and 1'],
      ['error', '1-D errors of the core, all terms in'],
      ['tail', 'wide component'],
    ],
    returns: 'radius, arcsec, good to 1e-9 of itself',
  },
  {
    id: 'counterpart/search-radius#shareInside',
    summary: 'Share of true offsets inside a circle about the HI position. Method: position.',
    params: [
      ['radiusArcsec', 'radius, arcsec'],
      ['error', '1-D errors of the core, all terms in'],
      ['tail', 'wide component'],
    ],
    returns: 'probability in [0, 1]',
  },
  {
    id: 'distance/distance-rule#chooseDistance',
    summary:
      'The distance of a source by the stated rule: measured, else flow model, else Hubble law, else none. A redshift gives no distance where the Local Group velocity is below the least one: there peculiar motion is as large as the Hubble flow. The Local Group velocity for this test is that of `hubbleFrame`, and for the CMB frame that of Karachentsev & Makarov (1996). Source: common practice; form of D_L from Davis et al. (2011), ApJ 741, 67 (from memory). Method: distance.',
    params: [
      ['input', 'what is known of the source'],
      ['rule', 'part of the criteria'],
      ['cosmology', 'flat ΛCDM for redshift distances'],
    ],
    returns:
      'Mpc for luminosities, D_L = (1+z) D_C(v/c), and for projections, D_A = D_C(v/c)/(1+z), with z the observed barycentric redshift and v the velocity in the frame or by the model; the error and every caution',
  },
  {
    id: 'distance/flow-model#flowVelocity',
    summary:
      'Cosmic velocity by linear infall to three attractors. The correction for each attractor is v_fid [cos θ + ((v_o - v_a cos θ)/r_oa)(r_oa/v_a)^(1-γ)] with γ = 2. Inside a cone the law fails (it yields -266 km/s beside the Great Attractor), so the collapse is not optional. Source: Mould et al. (2000), ApJ 529, 786, appendix A. Method: distance.',
    params: [
      ['czKms', 'optical cz, barycentric, km/s'],
      ['ra', 'right ascension (ICRS), radians'],
      ['dec', 'declination (ICRS), radians'],
      ['attractors', 'the attractors; others than the published ones only to study their effect'],
    ],
    returns: 'every branch, km/s',
  },
  {
    id: 'distance/distance-branches#distanceBranches',
    summary:
      'Every distance that a velocity may stand for: the Hubble law in three frames, the flow model with its infalls, and the cluster whose cone holds the source. Which is used is decided elsewhere; a reader sees how far they lie apart. Method: distance.',
    params: [
      ['czKms', 'optical cz, barycentric, km/s'],
      ['raRad', 'ICRS, radians'],
      ['decRad', 'ICRS, radians'],
      ['cosmology', 'flat cosmology'],
    ],
    returns:
      'the branches, Hubble first; empty without a velocity Source: Mould et al. (2000), ApJ 529, 786, for the flow; frames as in `velocity/frames`.',
  },
  {
    id: 'distance/cosmology#luminosityDistance',
    summary:
      'Luminosity distance, (1+z) D_C. Source: Hogg (1999); with two redshifts Davis et al. (2011), ApJ 741, 67 (form, from memory). Method: distance.',
    params: [
      ['z', 'cosmological redshift'],
      ['cosmology', 'flat ΛCDM'],
      ['observedZ', 'redshift as observed, where a peculiar velocity was taken off `z`: D_L = (1+z_obs) D_C(z)'],
    ],
    returns: 'Mpc',
  },
  {
    id: 'hydrogen/hi-mass#hiMass',
    summary:
      'HI mass of an optically thin source. Self-absorption is ignored (up to 10-20 per cent edge-on). Without its factor the local form is 1.7 per cent too high at z = 0.0083 and 10 per cent at z = 0.05. Source: M = 2.356e5 D_L^2 S (1+z)^-k, k = 2, 1, 0; Meyer et al. (2017), PASA 34, e052. Method: hi-mass.',
    params: [
      ['fluxJyKms', 'integrated line flux, Jy km/s, positive'],
      ['luminosityMpc', 'luminosity distance, Mpc, positive'],
      ['redshift', 'redshift of the line, > -1 (blueshifted local sources are legal)'],
      ['velocity', 'the velocity the flux was integrated in'],
    ],
    returns: 'HI mass, solar masses, without helium',
  },
  {
    id: 'hydrogen/hi-size#hiDiameterKpc',
    summary:
      'Diameter of an ordinary HI disc where its surface density falls to 1 solar mass per square parsec. A cloud much larger than this is no ordinary disc, whatever its distance. Calibrated from about 1e5.5 to 1e11. Source: Wang et al. (2016), MNRAS 460, 2143: log D = 0.506 log M - 3.293. Method: hi-mass.',
    params: [['logMass', 'log10 of the HI mass in solar masses, without helium']],
    returns: 'diameter, kpc; scatter 0.06 dex',
  },
  {
    id: 'hydrogen/baryonic-mass#baryonicMass',
    summary:
      'Mass of gas and stars together. Source: definitions; molecules and ionised gas are left out. Method: hi-mass.',
    params: [
      ['hiMassSolar', 'HI mass, solar masses, positive'],
      [
        'stellarMassSolar',
        'stellar mass, solar masses, not negative (0 for a source without stars; a limit gives limits)',
      ],
      ['heliumFactor', 'gas mass over HI mass, at least 1'],
    ],
    returns: 'gas and total mass, solar masses, and the gas fraction',
  },
  {
    id: 'velocity/frames#fromBarycentric',
    summary:
      'A barycentric cz in another frame of rest. Topocentric velocities need the site and time and must be corrected where they were observed. Source of each vector: SOLAR_MOTION. Method: velocity.',
    params: [
      ['frame', 'frame wanted'],
      ['czKms', 'optical cz, barycentric, km/s; negative values are legal'],
      ['ra', 'right ascension (ICRS), radians'],
      ['dec', 'declination (ICRS), radians'],
      ['combination', 'how to combine; by default additive but for the CMB'],
    ],
    returns: 'optical cz in the frame, km/s',
  },
  {
    id: 'counterpart/velocity-term#velocityFactor',
    summary:
      'Bayes factor of a velocity difference. N(dv) over the chance density, which has a clustered part: a third of the unrelated redshift objects near a detection are at its velocity too, and a bonus that forgets them makes matches worse. Method: velocity.',
    params: [
      ['differenceKms', 'cz difference over (1 + z), km/s'],
      ['scatterKms', 'see velocityScatter'],
      ['model', 'spread of unrelated redshifts'],
    ],
    returns: 'the floor for a discordant redshift; never below it, for redshifts can be wrong',
  },
  {
    id: 'counterpart/velocity-background#velocityHistogram',
    summary: 'Spread of redshifts over velocity. Method: velocity.',
    params: [['velocities', 'cz of unrelated objects, km/s; those missing, below zero or beyond z = 0.3 are left out']],
    returns: 'undefined with fewer than LEAST_REDSHIFTS',
  },
  {
    id: 'counterpart/velocity-background#clusteredShare',
    summary:
      'Share of the redshift objects near detections that are at their velocity by clustering. Method: velocity.',
    params: [
      ['counts', 'objects in the rings'],
      ['fallback', 'share taken where there are few'],
      ['pseudoCounts', 'objects the fallback counts for'],
    ],
    returns: 'in [0, 1]: s of concordant = s objects + (1 - s) expected, drawn towards the fallback',
  },
  {
    id: 'hydrogen/expected-counterpart#expectedCounterpart',
    summary:
      'Ordinary counterpart of an HI detection with a usable distance. Source: direct fit of stars given gas (see DEFAULT_GAS_STAR_RELATION), turned to r with its mass-to-light ratio and to other bands with the colours of gas-rich dwarfs. Method: expected.',
    params: [
      ['logHiMass', 'log10 of the HI mass in solar masses, without helium'],
      ['luminosityMpc', 'distance, Mpc, positive (used for angles too: they differ by 2 per cent at z = 0.01)'],
      ['band', 'band of the catalogue'],
      ['ebvMag', 'SFD98 E(B-V), mag'],
      ['settings', 'relation and colours; the defaults are stated where they are defined'],
    ],
    returns: 'magnitude distribution and sizes, or why there is none',
  },
  {
    id: 'hydrogen/gas-relation#stellarMassFromGas',
    summary: 'Typical stellar mass of the counterpart of an HI detection. Method: expected.',
    params: [
      ['logHiMass', 'log10 of the HI mass in solar masses'],
      ['relation', 'the line'],
    ],
    returns: 'log10 of the stellar mass in solar masses',
  },
  {
    id: 'photometry/size-prior#sizePriorKpc',
    summary:
      'Half-light radii of late-type galaxies of a stellar mass, with a diffuse tail. Below 1e8 solar masses the relation is extrapolated: 1.3 kpc at 1e8, 0.7 kpc at 1e6. Source: Shen et al. (2003), MNRAS 343, 978, late types (coefficients from memory); the tail after HI-bearing ultra-diffuse galaxies (our choice). Method: expected.',
    params: [
      ['logStellarMass', 'log10 of the stellar mass in solar masses'],
      ['tail', 'weight, size factor and scatter of the diffuse component'],
    ],
    returns: 'mixture of two log-normals, kpc',
  },
  {
    id: 'counterpart/learn-prior#learnPrior',
    summary:
      'Learns Q, the share of detections with a galaxy of stars, per bin of HI mass. Expectation maximisation: Q <- mean of Q a / (Q a + 1 - Q), to 1e-6. Method: prior.',
    params: [
      ['logMass', 'log10 of the HI mass of each detection; NaN is left out'],
      [
        'evidence',
        "a_i = (1 - c_i) + sum of the objects' weights for prior one: how many times likelier the data are with a counterpart than without. One says nothing.",
      ],
      ['settings', 'bins, fallback and its strength'],
    ],
    returns: 'the bins in order, empty ones included between the first and the last',
  },
  {
    id: 'counterpart/exclusive#exclusiveProbabilities',
    summary:
      "Probabilities of a detection's hypotheses. P(none) = R (1 - Q) / S, P(missed) = R Q (1 - c) / S, P(j) = R X_j / S, P(spurious) = (1 - R) / S. With c = 1 and R = 1 it is Sutherland & Saunders (1992) with a velocity term; with no object it is Bayes' theorem for a silence. Method: counterpart, reliability.",
    params: [
      [
        'weights',
        'X_j of the objects for prior one: density of counterparts over density of unrelated objects, times magnitude and velocity factors (the prior is multiplied in here)',
      ],
      ['prior', 'Q, share of such detections that have a galaxy of stars, in (0, 1)'],
      ['completeness', 'c, chance that the ordinary counterpart would have been seen here, in [0, 1]'],
      ['reliability', 'R, chance that the line is real, in [0, 1]'],
    ],
    returns: '',
  },
  {
    id: 'doubts/spurious-line#spuriousLine',
    summary:
      'Doubt that the line is noise. Lists of dark detections concentrate false ones, so the reliability of the list as a whole is too kind. Method: reliability.',
    params: [
      ['input', 'reliability (preferred) or signal-to-noise ratio'],
      ['settings', 'thresholds'],
    ],
    returns: 'the doubt; `not testable here` where the list gives neither',
  },
  {
    id: 'counterpart/magnitude-term#countMagnitudes',
    summary:
      'Number counts of a catalogue, measured from itself. Bins are smoothed with their neighbours and kept from falling towards the faint end: there a table loses unrelated objects and counterparts alike, so that the loss cancels in their ratio only if n is the true density. Bright bins with few objects take the Euclidean slope from the first bin that has ten. Method: counterpart.',
    params: [
      ['magnitudes', 'magnitudes of all rows; NaN is left out'],
      ['areaSquareArcsec', 'area covered, square arcsec, positive'],
      ['widthMag', 'width of a bin, mag'],
    ],
    returns: 'undefined where no row has a magnitude',
  },
  {
    id: 'counterpart/merge-objects#mergeIntoObjects',
    summary:
      'Groups rows of several catalogues into physical objects. Rows of one catalogue are pieces of one galaxy when one lies inside the half-light radius of the other (or the two errors overlap); rows of different catalogues are one object when the posterior of the pair passes one half for the density of the second catalogue. Joining is transitive within these limits but each object keeps one place: that of its best-measured row, with which every further row is compared. Method: counterpart.',
    params: [['rows', 'rows near one detection, best measured first within equal claims']],
    returns: 'number of the object of each row, from 0, in the order in which objects first appear',
  },
  {
    id: 'counterpart/joint-claims#jointClaimFactors',
    summary:
      "Probabilities of shared galaxies when no galaxy belongs to two detections. The posterior of all detections together is the product of their own, restricted to assignments that use no galaxy twice and summed over all of them. With one claimant nothing changes. Where there would be more than 200,000 assignments the least claims are left out first. Source: Sutherland & Saunders (1992) for one detection; the restriction is Bayes' theorem. Method: counterpart.",
    params: [
      [
        'claimants',
        'detections that share galaxies, each with its own posterior of every shared one; sums at most one',
      ],
    ],
    returns:
      'for each claimant the factor by which the weight of each shared galaxy is to be multiplied, against all that is not shared, for its posterior to be the joint one; one for claims left out',
  },
  {
    id: 'counterpart/starlight#starlightVerdict',
    summary:
      'The starlight verdict: rules in order, the first that holds decides, and one always does. 1. `confused`: two or more galaxies at the gas velocity inside the beam; no dark claim is possible until resolved. 2. `nearly dark`: one object dominates and M_HI / L_r is over the limit; with too little power, `cannot tell`. 3. `starlit`: one object dominates; shallow data do not matter to it. 4. `contested`: objects together pass the least probability, none dominates; or the likeliest galaxy belongs to another detection, of which this gas may be a part. 5. `dark`: P(none) and P(none) + P(missed) are high enough, the power suffices, and no excess of faint objects hints at a galaxy in pieces. 6. `cannot tell`. Method: counterpart.',
    params: [],
    returns: '',
  },
  {
    id: 'counterpart/expected-flux#expectedFluxShares',
    summary:
      "Share of the detection's flux that each galaxy in the beam should give. All lie at one distance, so the share goes as predicted mass times the response exp(-4 ln 2 theta^2 / FWHM^2). Method: confusion.",
    params: [['members', 'galaxies at the gas velocity']],
    returns:
      'shares that add to one, in the same order; a galaxy without a magnitude counts as the median of the others',
  },
  {
    id: 'hydrogen/gas-to-light#gasToLight',
    summary: 'HI mass per unit of light or of stellar mass. Method: gas-to-light.',
    params: [
      ['hiMassSolar', 'HI mass, solar masses, positive'],
      ['lightSolar', 'luminosity (or stellar mass) in solar units, positive, at the same distance as the mass'],
      ['isLimit', 'true where the light is an upper limit'],
    ],
    returns: 'ratio in solar units, free of distance, with its kind',
  },
  {
    id: 'photometry/completeness#expectedDetection',
    summary:
      'Chance that the counterpart expected of an HI detection is in the catalogue: its share of the power of a silence. Exact over magnitude (a Gaussian against an error function is an error function), seven-point Gauss-Hermite over the logarithm of each size component: within 1e-3 of a fine sum for scatters up to 0.5 dex; about 5 microseconds. Size and magnitude are taken as independent at the expected stellar mass. Method: absence.',
    params: [
      ['expected', 'distribution of magnitudes, dimmed by extinction, same system as the depth'],
      ['sizes', 'half-light radii on the sky, arcsec'],
      ['depth', 'point-source depth and image quality at the place'],
      ['settings', 'roll-off, penalty and ceiling'],
    ],
    returns: 'probability in [0, ceiling]',
  },
  {
    id: 'photometry/extended-depth#extendedLimit',
    summary:
      'Limiting total magnitude of an extended galaxy from a point-source depth. White noise growing as the square root of the area. Source: 5 sigma inside r_e, which holds half of the light. Method: absence.',
    params: [
      ['depth', '5-sigma point-source depth and image quality'],
      ['effectiveRadiusArcsec', 'half-light radius, arcsec, not negative'],
      ['penaltyMag', 'what real catalogues lose besides (sky subtraction, deblending, cuts); 0.5-1 mag is common'],
    ],
    returns: 'limiting total magnitude; never deeper than the point-source depth',
  },
  {
    id: 'photometry/mask-overlap#maskedProbability',
    summary:
      'Share of the positional probability inside a search radius that lies under masks. 1000 fixed points of equal probability on a sunflower pattern: the same answer every time, good to about 0.005. Method: absence.',
    params: [
      ['sigmaArcsec', '1-D position error, arcsec, positive'],
      ['searchArcsec', 'search radius, arcsec, positive'],
      ['masks', 'masked circles; overlaps count once'],
    ],
    returns: 'fraction in [0, 1]: the probability that counts, not the area',
  },
  {
    id: 'photometry/star-mask#starMaskRadius',
    summary:
      "Radius around a bright star inside which a catalogue's silence means nothing. Source: Legacy Surveys mask relation, r = 1630 arcsec 1.396^-G. Method: absence.",
    params: [['gaiaG', 'Gaia G magnitude of the star']],
    returns: 'radius, arcsec; half of it is the inner core. Callers leave stars fainter than G = 13 unmasked.',
  },
  {
    id: 'photometry/faint-excess#crowdingChance',
    summary:
      'Chance of so many objects inside a circle, or more, if they are spread as in the ring about it. A large galaxy of low surface brightness stands in catalogues as several faint pieces. Of all objects together a share 1 / (1 + ratio) falls inside by chance: binomial, exact, and free of the density, which differs from place to place. Method: absence.',
    params: [
      ['inside', 'objects inside the circle'],
      ['ring', 'objects in the ring'],
      ['areaRatio', 'area of the ring over that of the circle, positive'],
    ],
    returns: 'probability in [0, 1]; 1 for none inside',
  },
  {
    id: 'photometry/limits#physicalLimit',
    summary:
      'Physical meaning of a magnitude limit: the depth must be the extended-source one of the size assumed. Method: limits.',
    params: [
      ['magnitude', 'limiting magnitude'],
      ['extinctionMag', 'extinction in the band, mag'],
      ['luminosityMpc', 'luminosity distance, Mpc'],
      ['solar', 'absolute magnitude of the Sun, same band and system'],
      ['massToLight', 'stellar mass over luminosity, solar units, positive (see `MASS_TO_LIGHT`)'],
    ],
    returns: 'absolute magnitude, luminosity and stellar mass at the limit',
  },
  {
    id: 'photometry/star-formation#starFormationRate',
    summary:
      'Star-formation rate of a luminosity; of a limit it is a limit. TIR and 24 micron assume ordinary dust: a metal-poor dwarf is invisible there, so their silence says almost nothing. Method: limits.',
    params: [
      ['luminosityErg', 'nu L_nu, erg/s (erg/s/Hz at 1.4 GHz), positive'],
      ['tracer', 'which light'],
    ],
    returns: 'solar masses a year, Kroupa initial mass function',
  },
  {
    id: 'photometry/extinction#extinction',
    summary:
      'Galactic extinction in a band. Fractional error 16 per cent. Above E(B-V) = 0.3 the optical and the ultraviolet are not tested by a catalogue. Source: Schlafly & Finkbeiner (2011), R_V = 3.1. Method: extinction.',
    params: [
      ['band', 'photometric band'],
      [
        'ebvMag',
        'E(B-V) of the original SFD98 map, mag, not negative; a column already scaled by 0.86 must be undone first',
      ],
      ['ultraviolet', 'law for FUV and NUV'],
    ],
    returns: 'A_b, mag, to be subtracted once from the observed magnitude',
  },
  {
    id: 'surroundings/alone-probability#aloneProbability',
    summary:
      'P(no neighbour) = mean over the draws of [none known inside the window] exp(-N_missed), times the covered share. Method: surroundings.',
    params: [
      ['draws', 'equally likely distances, at least one'],
      ['covered', 'covered share of the circle, 0 to 1'],
    ],
    returns: '',
  },
  {
    id: 'surroundings/missed-neighbours#missedNeighbours',
    summary: 'Expected number of neighbours that count and that a redshift survey did not see. Method: surroundings.',
    params: [
      ['limitAbsoluteMag', 'what the survey reaches at that distance, M_r'],
      ['faintestAbsoluteMag', 'faintest neighbour that counts, M_r'],
      ['window', 'cylinder'],
      ['law', 'luminosity function'],
    ],
    returns: 'for the mean field; times clusteringBoost for the clustered bracket. 0 where the survey goes deeper.',
  },
  {
    id: 'surroundings/surroundings-verdict#surroundingsVerdict',
    summary:
      'The surroundings verdict: rules in order, the first that holds decides, and one always does. `in a cluster`, `in a group`, `accompanied`, `alone`, else `cannot tell`. Incompleteness, edges and an unusable distance can defeat only `alone`: a known neighbour at the same velocity is enough, whatever is incomplete. Method: surroundings.',
    params: [],
    returns: '',
  },
  {
    id: 'surroundings/group-membership#isMember',
    summary: 'Whether a place belongs to a group or a cluster. Method: surroundings.',
    params: [
      ['structure', 'group or cluster'],
      ['separationKpc', "projected separation at the structure's own distance, kpc"],
      ['differenceKms', 'velocity difference from its mean, km/s'],
      ['reach', 'in units of R200; 1 strict, 2 to 3 loose'],
    ],
    returns: '',
  },
  {
    id: 'surroundings/density-measures#projectedDensity',
    summary: 'Projected density Sigma_n = n / (pi d_n^2), per square Mpc. Method: measures.',
    params: [
      ['rank', 'n, at least 1'],
      ['distanceMpc', 'projected distance of the n-th neighbour, Mpc, positive'],
    ],
    returns: '',
  },
  {
    id: 'surroundings/density-measures#localDensity',
    summary:
      'Local number density eta_k = log10[(k - 1) / V(r_k)]; isolated below 2.4 (unit Mpc, from memory). Method: measures.',
    params: [
      ['rank', 'k, at least 2'],
      ['distanceMpc', 'distance of the k-th neighbour, Mpc, positive'],
    ],
    returns: '',
  },
  {
    id: 'surroundings/density-measures#tidalIndex',
    summary:
      'Tidal index of the main disturber, Theta_1 = max log10(M / D^3) - 10.96; below zero isolated. Method: measures.',
    params: [],
    returns: '',
  },
  {
    id: 'surroundings/density-measures#tidalStrength',
    summary: 'Tidal strength Q = log10 sum (M_i / M_p) (D_p / d_i)^3; isolated below -2. Method: measures.',
    params: [['neighbours', "mass over the primary's, and distance in units of the primary's diameter"]],
    returns: '',
  },
  {
    id: 'surroundings/density-measures#spoilsIsolation',
    summary:
      "Whether a neighbour of some angular diameter spoils a galaxy's isolation; needs no redshift. Method: measures.",
    params: [
      ['diameter', 'angular diameter of the galaxy'],
      ['neighbourDiameter', 'angular diameter of the neighbour, same unit'],
      ['separation', 'separation, same unit Source: Karachentseva (1973): a_1/4 <= a_i <= 4 a_1 nearer than 20 a_i.'],
    ],
    returns: '',
  },
  {
    id: 'surroundings/group-membership#r200Kpc',
    summary: 'Radius inside which a halo has 200 times the critical density. Method: measures.',
    params: [
      ['mass', 'mass inside it, solar masses, positive'],
      ['h0', 'Hubble constant, km/s/Mpc'],
    ],
    returns: 'kpc',
  },
  {
    id: 'doubts/cloud#cloud',
    summary:
      'Doubt that the gas belongs to the Galaxy or to a high-velocity cloud. A compact cloud with a narrow line (15-40 km/s) and a dwarf of the Local Group cannot be told apart without a distance, so neither distance nor isolation is claimed for them. Method: doubts.',
    params: [
      ['input', 'direction, velocities and width'],
      ['settings', 'thresholds'],
    ],
    returns: 'the doubt; its value is the deviation velocity, km/s',
  },
  {
    id: 'doubts/deviation-velocity#deviationVelocity',
    summary:
      'Deviation velocity: how far a velocity lies outside what the Galactic disc allows in that direction. Source: Wakker (1991), A&A 250, 499. Method: doubts.',
    params: [
      ['lonRad', 'Galactic longitude, radians'],
      ['latRad', 'Galactic latitude, radians'],
      ['lsrKms', 'velocity in the kinematic LSR, km/s'],
      ['disc', 'model of the disc'],
    ],
    returns: 'v - v_max above the range (positive), v - v_min below it (negative), else 0, km/s',
  },
  {
    id: 'doubts/debris#debris',
    summary:
      'Doubt that the gas was drawn or stripped out of a neighbour. Strong zone: serious. Possible zone: watch, or serious with a bridge. A neighbour whose mass is unknown counts for one grade less. Source: common practice after the debris of NGC 4254 that was taken for a dark galaxy (Haynes et al. 2007; Duc & Bournaud 2008). Method: doubts.',
    params: [
      [
        'input',
        "neighbours, with their own distances: debris lies at the neighbour's distance, not at its Hubble distance",
      ],
      ['settings', 'the two zones and the least mass of a neighbour that can shed gas'],
    ],
    returns: 'the doubt with the responsible neighbour; value is its projected distance, kpc',
  },
  {
    id: 'doubts/hydroxyl#hydroxyl',
    summary:
      'Doubt that the line is a hydroxyl megamaser at z near 0.2. A true dark source has no luminous mid-infrared source; a silent infrared catalogue therefore clears it. Method: doubts.',
    params: [['input', "the line's redshift and the infrared sources around it"]],
    returns: 'the doubt; its value is the redshift the line would have as OH 1667 MHz',
  },
  {
    id: 'doubts/recombination-line#recombinationLine',
    summary: 'Doubt that the line is a hydrogen recombination line of Galactic ionised gas. Method: doubts.',
    params: [['input', 'velocity, width, latitude and continuum']],
    returns: 'the doubt; its value is the distance to the nearest such line, km/s',
  },
  {
    id: 'doubts/interference#interference',
    summary:
      'Doubt that the line was made by a transmitter. What repeats at one frequency in many directions is interference whatever the list says. Method: doubts.',
    params: [['input', "line and the survey's list of bands"]],
    returns: 'the doubt; its value is the gap to the nearest band, km/s, zero inside it',
  },
  {
    id: 'doubts/blend#blend',
    summary: 'Doubt that the beam holds more than one source, which also pulls the centroid. Method: doubts.',
    params: [['input', "beam, distance and known galaxies at the line's velocity"]],
    returns:
      'the doubt; its value is the chance of another source, or the number of known galaxies where there are several',
  },
  {
    id: 'doubts/sidelobe#sidelobe',
    summary: 'Doubt that the detection is the sidelobe of a stronger source at the same velocity. Method: doubts.',
    params: [['input', 'other HI sources, beam and flux']],
    returns: 'the doubt; its value is the flux ratio of the source named',
  },
  {
    id: 'doubts/continuum#continuum',
    summary: 'Doubt that ripples of a strong continuum source made the line. Method: doubts.',
    params: [['input', 'strongest continuum source in the beam and coverage']],
    returns: 'the doubt; its value is that flux density, mJy',
  },
  {
    id: 'doubts/edge#edge',
    summary:
      'Doubt that the catalogues end too near. Beyond an edge the nearest neighbour is only a lower limit. Method: doubts.',
    params: [['input', 'covered shares of the two circles']],
    returns: 'the doubt; its value is the smaller share',
  },
  {
    id: 'robustness/stability#stability',
    summary: 'Repeats a verdict over draws, more of them while the answer is near the cut. Method: stability.',
    params: [
      ['nominal', 'verdict of the nominal run'],
      ['verdictOf', 'verdict of draw k, from the same code as the nominal run; called once for k = 0, 1, 2 ...'],
      ['options', 'draws to begin with, cap, and the cut the agreement is compared with'],
    ],
    returns: 'tally, agreement and interval',
  },
  {
    id: 'robustness/intervals#wilsonInterval',
    summary:
      'Wilson interval of a fraction: close to exact, and sensible at 0 and 1. Source: Wilson (1927), J. Am. Stat. Assoc. 22, 209. Method: stability.',
    params: [
      ['successes', 'number of successes, an integer in [0, trials]'],
      ['trials', 'number of trials, a positive integer'],
      ['level', 'probability content, in (0, 1)'],
    ],
    returns: 'interval in [0, 1]',
  },
  {
    id: 'robustness/control#chanceFraction',
    summary: 'How often chance alone makes a match. Method: control.',
    params: [
      ['matched', 'control positions with a match'],
      ['positions', 'control positions kept (dropped ones do not count)'],
    ],
    returns: 'fraction, error sqrt(k)/N and exact interval (Garwood); at k = 0 quote the interval',
  },
  {
    id: 'robustness/control#correctedCounts',
    summary:
      'Corrects a count of matches, and of absences, for chance. Source: (f_obs - f_ch) / (1 - f_ch), binomial error of f_obs over 1 - f_ch; the error of f_ch itself is left out. Method: control.',
    params: [
      ['matched', 'sources with a match'],
      ['sources', 'all sources'],
      ['chance', 'chance fraction from the control, in [0, 1)'],
    ],
    returns: 'true fraction, and the number of absences: unmatched sources are always too few',
  },
];
