/** The four faces in use: single weights, since the packages' index would bring all of them. */
import { AtkinsonHyperlegible_400Regular } from '@expo-google-fonts/atkinson-hyperlegible/400Regular';
import { AtkinsonHyperlegible_700Bold } from '@expo-google-fonts/atkinson-hyperlegible/700Bold';
import { RobotoMono_400Regular } from '@expo-google-fonts/roboto-mono/400Regular';
import { RobotoMono_600SemiBold } from '@expo-google-fonts/roboto-mono/600SemiBold';

export const FONT_FILES = {
  AtkinsonHyperlegible_400Regular,
  AtkinsonHyperlegible_700Bold,
  RobotoMono_400Regular,
  RobotoMono_600SemiBold,
};
