// Builds for production: browser assets, workers, pages.
import { build, checkNode, loadSettings } from './steps.mjs';

checkNode();
loadSettings();
build({ force: true });
